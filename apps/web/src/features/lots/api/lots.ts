import type { LotListItem, LotView, Page } from '@app/contracts';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import type { LotFilters } from '../../../app/urls';
import { apiGet } from '../../../shared/api/client';
import { lotsPath } from '../filters';

export const lotKey = (lotId: number) => ['lots', lotId] as const;

export function useLots(filters: LotFilters, plant: { id: number; timeZone: string }) {
  const path = lotsPath(filters, plant);
  return useQuery({
    queryKey: ['lots', path],
    queryFn: ({ signal }) => apiGet<Page<LotListItem>>(path, signal),
    placeholderData: keepPreviousData,
  });
}

export function useLot(lotId: number) {
  return useQuery({
    queryKey: lotKey(lotId),
    queryFn: ({ signal }) => apiGet<LotView>(`/lots/${lotId}`, signal),
  });
}

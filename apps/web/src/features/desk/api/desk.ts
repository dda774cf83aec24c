import type { DeskView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiGet } from '../../../shared/api/client';

const REFRESH_MS = 30_000;

export const deskKey = (plantId: number) => ['desk', plantId] as const;

export function useDesk(plantId: number) {
  return useQuery({
    queryKey: deskKey(plantId),
    queryFn: ({ signal }) => apiGet<DeskView>(`/desk?plantId=${plantId}`, signal),
    refetchInterval: REFRESH_MS,
  });
}

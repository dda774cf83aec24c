import type { ChannelView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiList } from '../../../shared/api/client';

/** The line's channels in use, to say whose values a column holds. */
export function useLineChannels(lineId: number): { id: number; name: string; unit: string }[] {
  const { data = [] } = useQuery({
    queryKey: ['lines', lineId, 'channels'],
    queryFn: ({ signal }) => apiList<ChannelView>(`/lines/${lineId}/channels`, signal),
  });
  return data
    .filter(({ retiredSince }) => retiredSince === null)
    .map(({ id, name, characteristic }) => ({ id, name, unit: characteristic.unit }));
}

import type { ChannelView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiList } from '../../../shared/api/client';

export const channelsKey = (lineId: number) => ['lines', lineId, 'channels'] as const;

export function useChannels(lineId: number) {
  return useQuery({
    queryKey: channelsKey(lineId),
    queryFn: ({ signal }) => apiList<ChannelView>(`/lines/${lineId}/channels`, signal),
  });
}

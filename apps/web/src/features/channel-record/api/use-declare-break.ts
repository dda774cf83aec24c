import type { BreakKind, BreakView, Instant } from '@app/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { apiSend } from '../../../shared/api/client';
import { channelKeys } from '../../../shared/record/channel-keys';

export interface BreakRequest {
  at: Instant;
  kind: BreakKind;
  reason: string;
}

export function useDeclareBreak(channelId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: BreakRequest) => apiSend<BreakView>('POST', `/channels/${channelId}/breaks`, body),
    onSuccess: () => client.invalidateQueries({ queryKey: channelKeys.channel(channelId) }),
  });
}

import type { ChannelView, PlanView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiList, apiSend } from '../../../shared/api/client';
import { channelKeys } from '../../../shared/record/channel-keys';

const POLL_MS = 2_000;
const plansKey = (channelId: number) => [...channelKeys.channel(channelId), 'plans'] as const;

/** A draft whose numbers the server is still working out. */
export const isBeingWorkedOut = (plan: PlanView) =>
  plan.state === 'draft' && plan.parameters === null && plan.failure === null;

export function useChannel(channelId: number) {
  return useQuery({
    queryKey: channelKeys.channel(channelId),
    queryFn: ({ signal }) => apiGet<ChannelView>(`/channels/${channelId}`, signal),
  });
}

export function usePlans(channelId: number) {
  return useQuery({
    queryKey: plansKey(channelId),
    queryFn: ({ signal }) => apiList<PlanView>(`/channels/${channelId}/plans`, signal),
    refetchInterval: (query) => (query.state.data?.some(isBeingWorkedOut) ? POLL_MS : false),
  });
}

export function useProposeDefault(channelId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { reason: string; isRobust: boolean }) =>
      apiSend<PlanView>('POST', `/channels/${channelId}/plans`, body),
    onSuccess: () => client.invalidateQueries({ queryKey: channelKeys.channel(channelId) }),
  });
}

export function useApprove(planId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { password: string }) => apiSend<unknown>('POST', `/plans/${planId}/approval`, body),
    // An approval has the channel judged again: strip, desk and records may all change.
    onSuccess: () => client.invalidateQueries(),
  });
}

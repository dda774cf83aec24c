import type { DecisionRequest, HoldView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';

export const holdKey = (holdId: number) => ['holds', holdId] as const;

export function useHold(holdId: number) {
  return useQuery({
    queryKey: holdKey(holdId),
    queryFn: ({ signal }) => apiGet<HoldView>(`/holds/${holdId}`, signal),
  });
}

/** A decision shows on the strip, the desk, the lots and the records: all that is on the screen is asked for again. */
function useRenewEverything() {
  const client = useQueryClient();
  return () => client.invalidateQueries();
}

export function useSetAside(holdId: number) {
  const renew = useRenewEverything();
  return useMutation({
    mutationFn: (body: { place?: string }) => apiSend<unknown>('POST', `/holds/${holdId}/set-aside`, body),
    onSettled: renew,
  });
}

export function useDecide(holdId: number) {
  const renew = useRenewEverything();
  return useMutation({
    mutationFn: (body: DecisionRequest) => apiSend<unknown>('POST', `/holds/${holdId}/decision`, body),
    onSuccess: renew,
  });
}

import type { SettledChange } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiList, apiSend } from '../../../shared/api/client';
import { intakeKeys } from './use-intakes';

const settledKey = (intakeId: number) => [...intakeKeys.one(intakeId), 'settled'] as const;

export function useSettledChanges(intakeId: number) {
  return useQuery({
    queryKey: settledKey(intakeId),
    queryFn: ({ signal }) => apiList<SettledChange>(`/intakes/${intakeId}/settled`, signal),
  });
}

export function useRejudgeSettled(intakeId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => apiSend<SettledChange[]>('POST', `/intakes/${intakeId}/settled`),
    onSettled: () => client.invalidateQueries({ queryKey: settledKey(intakeId) }),
  });
}

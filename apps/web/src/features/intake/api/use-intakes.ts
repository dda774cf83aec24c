import type {
  ConfirmIntakeRequest,
  IntakeListItem,
  IntakeState,
  IntakeView,
  ReadAgainRequest,
  WithdrawIntakeRequest,
  WorkbookAnswers,
} from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiList, apiSend } from '../../../shared/api/client';

export const intakeKeys = {
  ofLine: (lineId: number) => ['lines', lineId, 'intakes'] as const,
  one: (intakeId: number) => ['intakes', intakeId] as const,
};

const POLL_MS = 2_000;

/** States in which the server is at work on an intake. */
export const isMoving = (state: IntakeState) => state === 'received' || state === 'queued' || state === 'working';

export function useLineIntakes(lineId: number) {
  return useQuery({
    queryKey: intakeKeys.ofLine(lineId),
    queryFn: ({ signal }) => apiList<IntakeListItem>(`/lines/${lineId}/intakes`, signal),
    refetchInterval: (query) => (query.state.data?.some((item) => isMoving(item.state)) ? POLL_MS : false),
  });
}

export function useIntake(intakeId: number) {
  return useQuery({
    queryKey: intakeKeys.one(intakeId),
    queryFn: ({ signal }) => apiGet<IntakeView>(`/intakes/${intakeId}`, signal),
    // The event stream tells of progress; this finds the end even if the stream cannot be had.
    refetchInterval: (query) => (query.state.data !== undefined && isMoving(query.state.data.state) ? POLL_MS : false),
  });
}

export function useConfirmIntake(intakeId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (request: ConfirmIntakeRequest) => apiSend<unknown>('POST', `/intakes/${intakeId}/confirm`, request),
    onSettled: () => client.invalidateQueries({ queryKey: intakeKeys.one(intakeId) }),
  });
}

/** Has the workbook read again by other answers. */
export function useReadAgain(intakeId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (answers: WorkbookAnswers) =>
      apiSend<IntakeView>('POST', `/intakes/${intakeId}/reading`, { answers } satisfies ReadAgainRequest),
    onSuccess: (intake) => client.setQueryData(intakeKeys.one(intakeId), intake),
    onError: () => client.invalidateQueries({ queryKey: intakeKeys.one(intakeId) }),
  });
}

export function useWithdrawIntake(intakeId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (request: WithdrawIntakeRequest) => apiSend<unknown>('POST', `/intakes/${intakeId}/withdraw`, request),
    onSuccess: () => client.invalidateQueries(),
  });
}

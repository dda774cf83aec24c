import type { SummaryListView, SummaryRequest, SummaryRequested, SummaryView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';
import { useToast } from '../../../shared/ui/toast';
import { isAwaited } from '../week';

/** While a summary is being made. */
const POLL_MS = 1_500;
/** The week's summary comes by itself. */
const REFRESH_MS = 15_000;

export const summariesKey = (plantId: number) => ['summaries', 'of', plantId] as const;

/** `awaited`: a version that a worker makes just now; the list is read until it has it or it was given up. */
export function useSummaries(plantId: number, awaited: SummaryRequested | null = null) {
  return useQuery({
    queryKey: summariesKey(plantId),
    queryFn: ({ signal }) => apiGet<SummaryListView>(`/plants/${plantId}/summaries`, signal),
    refetchInterval: ({ state: { data } }) =>
      isAwaited(data, awaited) || data?.underWay.some(({ state }) => state === 'being_made') ? POLL_MS : REFRESH_MS,
  });
}

export function useSummary(id: number) {
  return useQuery({
    queryKey: ['summaries', id],
    queryFn: ({ signal }) => apiGet<SummaryView>(`/summaries/${id}`, signal),
  });
}

/** Has a week's summary made anew; a worker does it. */
export function useMakeSummary(plantId: number, onRequested: (requested: SummaryRequested) => void) {
  const queries = useQueryClient();
  const toast = useToast();
  return useMutation({
    mutationFn: (request: SummaryRequest) => apiSend<SummaryRequested>('POST', `/plants/${plantId}/summaries`, request),
    onSuccess: onRequested,
    onError: toast.failed,
    onSettled: () => queries.invalidateQueries({ queryKey: summariesKey(plantId) }),
  });
}

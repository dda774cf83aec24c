import type { SummaryListView, SummaryRequest, SummaryRequested, SummaryView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';
import { useToast } from '../../../shared/ui/toast';
import { sentSentence } from '../summary-words';
import { isMade } from '../week';

/** While a summary is being made. */
const POLL_MS = 1_500;

export const summariesKey = (plantId: number) => ['summaries', 'of', plantId] as const;

/** `awaited`: a version that a worker makes just now; the list is read until it has it. */
export function useSummaries(plantId: number, awaited: SummaryRequested | null = null) {
  return useQuery({
    queryKey: summariesKey(plantId),
    queryFn: ({ signal }) => apiGet<SummaryListView>(`/plants/${plantId}/summaries`, signal),
    refetchInterval: ({ state }) => (awaited === null || isMade(state.data?.items, awaited) ? false : POLL_MS),
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

/** Mails the version that is shown to whoever gets the plant's summaries. */
export function useSendSummary(id: number) {
  const toast = useToast();
  return useMutation({
    mutationFn: () => apiSend<{ recipients: number }>('POST', `/summaries/${id}/send`),
    onSuccess: ({ recipients }) => toast.done(sentSentence(recipients)),
    onError: toast.failed,
  });
}

import type { MailSentAgain, MailsView, MailView } from '@app/contracts';
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';
import { useToast } from '../../../shared/ui/toast';
import { type MailFilters, mailsPath } from '../filters';

const REFRESH_MS = 15_000;

export function useMails(plantId: number, filters: MailFilters) {
  const path = mailsPath(plantId, filters);
  return useQuery({
    queryKey: ['mails', path],
    queryFn: ({ signal }) => apiGet<MailsView>(path, signal),
    placeholderData: keepPreviousData,
    refetchInterval: REFRESH_MS,
  });
}

export function useMail(id: number) {
  return useQuery({
    queryKey: ['mails', id],
    queryFn: ({ signal }) => apiGet<MailView>(`/mails/${id}`, signal),
    refetchInterval: REFRESH_MS,
  });
}

/** Sends a mail again; `onSent` is told which mail is on its way now. */
export function useSendAgain(recipient: string, onSent?: (mailId: number) => void) {
  const queries = useQueryClient();
  const toast = useToast();
  return useMutation({
    mutationFn: (id: number) => apiSend<MailSentAgain>('POST', `/mails/${id}/send-again`),
    onSuccess: ({ id }) => {
      toast.done(`The mail to ${recipient} is on its way again.`);
      onSent?.(id);
    },
    onError: toast.failed,
    onSettled: () => queries.invalidateQueries({ queryKey: ['mails'] }),
  });
}

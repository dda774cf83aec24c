import type { LinkAnswer, LinkRequest, LinkView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';

const pathOf = (token: string) => `/auth/links/${encodeURIComponent(token)}`;

export function useLink(token: string) {
  return useQuery({
    queryKey: ['links', token] as const,
    queryFn: ({ signal }) => apiGet<LinkView>(pathOf(token), signal),
    retry: false,
    // Choosing the password uses the link up; the form must not vanish for that.
    staleTime: Infinity,
  });
}

export const choosePassword = (token: string, body: LinkRequest) => apiSend<LinkAnswer>('POST', pathOf(token), body);

export const askForReset = (email: string) => apiSend<void>('POST', '/auth/password-reset', { email });

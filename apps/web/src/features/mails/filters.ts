import { MAIL_STATES, type MailState } from '@app/contracts';
import { withQuery } from '../../app/urls';

export interface MailFilters {
  state: MailState | null;
  kind: string | null;
  page: number;
}

export const PAGE_SIZE = 50;

/** The filters that an address holds; what is malformed is not set. */
export function mailFiltersIn(search: URLSearchParams): MailFilters {
  const page = Number(search.get('page'));
  return {
    state: MAIL_STATES.find((state) => state === search.get('state')) ?? null,
    kind: search.get('kind') || null,
    page: Number.isInteger(page) && page > 1 ? page : 1,
  };
}

export const mailsPath = (plantId: number, filters: MailFilters) =>
  withQuery(`/plants/${plantId}/mails`, { ...filters, pageSize: PAGE_SIZE });

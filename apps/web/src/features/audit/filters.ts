import { withQuery } from '../../app/urls';
import { plantInstant } from '../../shared/time/plant-time';

export const PAGE_SIZE = 50;

/** What the address narrows the trail to. Days are the plant's own. */
export interface AuditFilters {
  /** Number of a person; 0: what Ebbline did by itself. */
  person?: number | null;
  kind?: string | null;
  /** Number of one thing of the kind. */
  thing?: number | null;
  action?: string | null;
  from?: string | null;
  to?: string | null;
  text?: string | null;
  page?: number | null;
}

const DAY = /^\d{4}-\d{2}-\d{2}$/;

/** The filters that an address holds; what is malformed is not set. */
export function auditFiltersIn(search: URLSearchParams): AuditFilters {
  const kind = search.get('kind');
  return {
    person: count(search.get('person'), 0),
    kind,
    thing: kind === null ? null : count(search.get('thing'), 1),
    action: search.get('action'),
    from: day(search.get('from')),
    to: day(search.get('to')),
    text: search.get('text'),
    page: count(search.get('page'), 1) ?? 1,
  };
}

/** The address's query for these filters, without what is not set. */
export function auditSearch(filters: AuditFilters): URLSearchParams {
  const address = withQuery('', { ...filters, page: filters.page === 1 ? null : filters.page });
  return new URLSearchParams(address.slice(1));
}

export function isNarrowed({ page: _page, ...filters }: AuditFilters): boolean {
  return Object.values(filters).some((value) => value !== null && value !== undefined && value !== '');
}

/** The API's query for these filters; `to` takes in its whole day. */
export function auditPath(plantId: number, timeZone: string, filters: AuditFilters, { isExport = false } = {}): string {
  const { from, to, text, page, ...same } = filters;
  return withQuery(`/plants/${plantId}/audit${isExport ? '/export' : ''}`, {
    ...same,
    from: from ? plantInstant(from, '00:00', timeZone) : null,
    to: to ? plantInstant(dayAfter(to), '00:00', timeZone) : null,
    text: text?.trim(),
    page: isExport ? null : page,
    pageSize: isExport ? null : PAGE_SIZE,
  });
}

const day = (value: string | null) => (value !== null && DAY.test(value) ? value : null);

function count(value: string | null, least: number): number | null {
  if (value === null || !/^\d{1,15}$/.test(value)) return null;
  return Number(value) >= least ? Number(value) : null;
}

function dayAfter(date: string): string {
  const next = new Date(`${date}T00:00:00Z`);
  next.setUTCDate(next.getUTCDate() + 1);
  return next.toISOString().slice(0, 10);
}

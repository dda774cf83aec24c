import { DISPOSITIONS } from '@app/contracts';
import { withQuery, type LotFilters } from '../../app/urls';
import { plantInstant } from '../../shared/time/plant-time';
import { FATE_WORDS } from '../../shared/ui/mark-words';

export const PAGE_SIZE = 50;
export const NEWEST_FIRST = '-startsAt';
const SORTS = ['startsAt', '-startsAt', 'number', '-number', 'score', '-score'];

export const STATE_CHOICES = [
  { value: '', label: 'any' },
  { value: 'outside_control_limits', label: 'outside control limits' },
  { value: 'outside_specification', label: 'outside specification' },
  { value: 'not_scored', label: 'not scored' },
  { value: 'within_control_limits', label: 'within control limits' },
  { value: 'released', label: 'released' },
  { value: 'scrapped', label: 'scrapped' },
  { value: 'measured', label: 'measured' },
  { value: 'scored', label: 'scored on a channel' },
  { value: 'not_fully_scored', label: 'without a score on a channel' },
];

/** What has to lie between the two days. */
export const TIME_CHOICES = [
  { value: '', label: 'started' },
  { value: 'ended', label: 'ended' },
  { value: 'held', label: 'put on hold' },
  { value: 'decided', label: 'decided' },
  { value: 'open', label: 'undecided at the end' },
];

export const DISPOSITION_CHOICES = [
  { value: '', label: 'anyhow' },
  ...DISPOSITIONS.map((value) => ({ value, label: FATE_WORDS[value] })),
];

export const HELD_CHOICES = [
  { value: '', label: 'held or not' },
  { value: 'open', label: 'held now' },
  { value: 'decided', label: 'held and decided' },
  { value: 'ever', label: 'held at any time' },
  { value: 'never', label: 'never held' },
];

/** Filters that narrow the list, taken away. */
export const UNNARROWED: LotFilters = {
  state: null,
  held: null,
  by: null,
  disposition: null,
  notScoredOn: null,
  notScoredFor: null,
  from: null,
  to: null,
  text: null,
};

const DAY = /^\d{4}-\d{2}-\d{2}$/;
const REASON = /^[a-z_]{1,60}$/;

/** The filters that an address holds; what is malformed is not set. */
export function filtersIn(search: URLSearchParams): LotFilters {
  const page = Number(search.get('page'));
  return {
    line: id(search.get('line')),
    state: known(search.get('state'), STATE_CHOICES),
    held: known(search.get('held'), HELD_CHOICES),
    by: known(search.get('by'), TIME_CHOICES),
    disposition: known(search.get('disposition'), DISPOSITION_CHOICES),
    notScoredOn: id(search.get('notScoredOn')),
    notScoredFor: REASON.exec(search.get('notScoredFor') ?? '')?.[0] ?? null,
    from: day(search.get('from')),
    to: day(search.get('to')),
    text: search.get('text'),
    sort: SORTS.find((sort) => sort === search.get('sort')) ?? NEWEST_FIRST,
    page: Number.isInteger(page) && page > 1 ? page : 1,
  };
}

const known = (value: string | null, choices: { value: string }[]) =>
  choices.some((choice) => choice.value === value) ? value : null;
const id = (value: string | null) => (value !== null && /^\d{1,15}$/.test(value) ? Number(value) : null);
const day = (value: string | null) => (value !== null && DAY.test(value) ? value : null);

/** Filters that narrow the list at all, the line and order aside. */
export function isNarrowed(filters: LotFilters): boolean {
  return Object.keys(UNNARROWED).some((name) => {
    const value = filters[name as keyof LotFilters];
    return value !== null && value !== undefined && value !== '';
  });
}

/** The API's query for these filters. Days are the plant's own; `to` takes in its whole day. */
export function lotsPath(filters: LotFilters, plant: { id: number; timeZone: string }, format?: 'xlsx'): string {
  return withQuery('/lots', {
    plantId: plant.id,
    lineId: filters.line,
    state: filters.state,
    held: filters.held,
    by: filters.by,
    disposition: filters.disposition,
    notScoredOn: filters.notScoredOn,
    notScoredFor: filters.notScoredFor,
    from: filters.from ? plantInstant(filters.from, '00:00', plant.timeZone) : null,
    to: filters.to ? plantInstant(dayAfter(filters.to), '00:00', plant.timeZone) : null,
    text: filters.text?.trim(),
    sort: filters.sort,
    page: format === undefined ? filters.page : null,
    pageSize: format === undefined ? PAGE_SIZE : null,
    format,
  });
}

export function dayAfter(date: string): string {
  const next = new Date(`${date}T00:00:00Z`);
  next.setUTCDate(next.getUTCDate() + 1);
  return next.toISOString().slice(0, 10);
}

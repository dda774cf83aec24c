/** The one source of the pages' addresses. `routes` are the router's patterns, `urls` fill them in. */
export const routes = {
  signIn: '/sign-in',
  forgottenPassword: '/forgotten-password',
  invitation: '/invitation/:token',
  newPassword: '/password/:token',
  profile: '/profile',
  people: '/plants/:plantId/people',
  desk: '/',
  lots: '/lots',
  lot: '/lots/:lotId',
  channels: '/lines/:lineId/channels',
  channel: '/channels/:channelId',
  plans: '/channels/:channelId/plans',
  plan: '/plans/:planId',
  intakes: '/lines/:lineId/intakes',
  intake: '/intakes/:intakeId',
  hold: '/holds/:holdId',
  summaries: '/plants/:plantId/summaries',
  summary: '/summaries/:summaryId',
  audit: '/plants/:plantId/audit',
  mails: '/plants/:plantId/mails',
  mail: '/mails/:mailId',
  newPlant: '/plants/new',
  setUp: '/plants/:plantId/set-up',
  setUpSection: '/plants/:plantId/set-up/:section',
} as const;

export interface LotFilters {
  line?: number | null;
  state?: string | null;
  held?: string | null;
  /** What from and to speak of; the lot's start without. */
  by?: string | null;
  disposition?: string | null;
  /** A channel on which the lots have no score, and why. */
  notScoredOn?: number | null;
  notScoredFor?: string | null;
  from?: string | null;
  to?: string | null;
  text?: string | null;
  sort?: string | null;
  page?: number | null;
}

export const urls = {
  signIn: (next?: string) => withQuery(routes.signIn, { next: next === routes.desk ? undefined : next }),
  forgottenPassword: () => routes.forgottenPassword,
  profile: () => routes.profile,
  desk: (lineId?: number | null) => withQuery(routes.desk, { line: lineId }),
  lots: (filters: LotFilters = {}) => withQuery(routes.lots, { ...filters }),
  lot: (lotId: number) => `/lots/${lotId}`,
  channels: (lineId: number) => `/lines/${lineId}/channels`,
  channel: (channelId: number, span: { from?: number; to?: number } = {}) =>
    withQuery(`/channels/${channelId}`, { ...span }),
  plans: (channelId: number) => `/channels/${channelId}/plans`,
  plan: (planId: number) => `/plans/${planId}`,
  intakes: (lineId: number) => `/lines/${lineId}/intakes`,
  intake: (intakeId: number) => `/intakes/${intakeId}`,
  hold: (holdId: number) => `/holds/${holdId}`,
  newPlant: () => routes.newPlant,
  setUp: (plantId: number, section?: string) =>
    section === undefined ? `/plants/${plantId}/set-up` : `/plants/${plantId}/set-up/${section}`,
  people: (plantId: number) => `/plants/${plantId}/people`,
  summaries: (plantId: number) => `/plants/${plantId}/summaries`,
  summary: (summaryId: number) => `/summaries/${summaryId}`,
  audit: (plantId: number) => `/plants/${plantId}/audit`,
  mails: (plantId: number, filters: { state?: string | null; kind?: string | null; page?: number | null } = {}) =>
    withQuery(`/plants/${plantId}/mails`, { ...filters }),
  mail: (mailId: number) => `/mails/${mailId}`,
};

type QueryValue = string | number | boolean | null | undefined;

/** The path with those of the query's values that are set. */
export function withQuery(path: string, query: Record<string, QueryValue>): string {
  const parameters = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== null && value !== undefined && value !== '') parameters.set(name, String(value));
  }
  const text = parameters.toString();
  return text === '' ? path : `${path}?${text}`;
}

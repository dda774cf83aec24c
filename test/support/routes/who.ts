/**
 * Who may do what, written off the table of roles by hand and not from the program's own list: the columns are engineer, quality manager,
 * technician, line lead, director, administrator. "Engineer, where the plant allows it" is tested at a plant that does.
 */
const COLUMNS = ['engineer', 'manager', 'technician', 'lead', 'director', 'admin'] as const;
export type OneRole = (typeof COLUMNS)[number];

const TABLE = {
  'read lines, lots, records, holds, gauges': 'x x x x x x',
  'upload and confirm an intake, withdraw one': 'x x - - - -',
  'confirm that a lot is set aside': 'x x - x - -',
  'release a lot held for control limits alone': 'x x - - - -',
  'any other decision, close a look-back, approve a plan': '- x - - - -',
  'draft and propose a plan, exclude a lot, declare a break': 'x x - - - -',
  'check standards, gauge checks, adjustments': 'x x x - - -',
  'read summaries': 'x x - - x -',
  'send summaries': '- x - - - -',
  audit: 'x x - - x x',
  'people, set-up, mail failures': '- - - - - x',
  // A specification is proposed by who drafts plans or sets the plant up; it is approved as a plan is.
  'propose a specification': 'x x - - - x',
} as const;

/** Beside the table: what needs no sign-in, and what is everybody's own, at no plant in particular. */
export type Who =
  keyof typeof TABLE | 'anybody, signed in or not' | 'everybody, of their own' | 'administrators of whichever plant';

export const ONE_ROLE_EACH: readonly OneRole[] = COLUMNS;

export function mayBe(who: Who): readonly OneRole[] {
  if (who === 'administrators of whichever plant') return ['admin'];
  if (!(who in TABLE)) return COLUMNS;
  const marks = TABLE[who as keyof typeof TABLE].split(' ');
  return COLUMNS.filter((_, index) => marks[index] === 'x');
}

export const isOfAPlant = (who: Who) => who in TABLE;

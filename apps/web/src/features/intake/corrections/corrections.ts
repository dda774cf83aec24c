import type { ColumnAnswer, ColumnRole, LayoutAnswers, SheetGrid, WorkbookAnswers } from '@app/contracts';

/** What a sheet is read by with the corrections that were not sent yet. */
export function layoutWith(grid: SheetGrid, draft: WorkbookAnswers): LayoutAnswers {
  const said = draft.sheets?.[grid.sheet] ?? {};
  return { ...grid.inForce, ...said, columns: { ...grid.inForce.columns, ...said.columns } };
}

/** The draft with one thing more said about a sheet; undefined takes what was said back. */
export function withLayout(draft: WorkbookAnswers, sheet: string, change: Partial<LayoutAnswers>): WorkbookAnswers {
  const merged = { ...draft.sheets?.[sheet], ...change };
  const layout = Object.fromEntries(Object.entries(merged).filter(([, value]) => value !== undefined));
  return { ...draft, sheets: { ...draft.sheets, [sheet]: layout } };
}

/** The draft with what a column is for. */
export function withColumn(
  draft: WorkbookAnswers,
  sheet: string,
  letters: string,
  answer: ColumnAnswer,
): WorkbookAnswers {
  const columns = { ...draft.sheets?.[sheet]?.columns, [letters]: answer };
  return withLayout(draft, sheet, { columns });
}

/** The draft with another header row; what was said about the columns of the old one goes. */
export function withHeader(draft: WorkbookAnswers, sheet: string, headerRow: number | null): WorkbookAnswers {
  return withLayout(draft, sheet, { headerRow, columns: undefined });
}

/** Roles as they are offered, the most frequent first; whose values a column holds is chosen with the channel. */
export const OFFERED_ROLES: ColumnRole[] = [
  'time',
  'date',
  'time_of_day',
  'lot',
  'product',
  'channel',
  'value',
  'unit',
  'position',
  'serial',
  'quantity',
  'remark',
  'ignored',
];

/** One choice for what a column is: a role, or a channel's values. */
export const choiceOf = ({ role, channelId }: ColumnAnswer): string =>
  role === 'channel_values' && channelId !== undefined ? `channel ${channelId}` : role;

/** The answer of a choice; unit and deviation are kept where the column still holds values. */
export function answerOf(choice: string, before: ColumnAnswer | undefined): ColumnAnswer {
  const channelId = /^channel (\d+)$/.exec(choice)?.[1];
  if (channelId === undefined && choice !== 'value') return { role: choice as ColumnRole };
  const { unit, isDeviation } = before ?? {};
  return {
    role: channelId === undefined ? 'value' : 'channel_values',
    ...(channelId !== undefined && { channelId: Number(channelId) }),
    ...(unit !== undefined && { unit }),
    ...(isDeviation !== undefined && { isDeviation }),
  };
}

/** Letters of the columns that the grid shows, in their order. */
export function lettersOf({ rows, inForce }: SheetGrid): string[] {
  const letters = new Set(rows.flatMap(({ cells }) => Object.keys(cells)));
  for (const column of Object.keys(inForce.columns ?? {})) letters.add(column);
  return [...letters].sort((a, b) => a.length - b.length || a.localeCompare(b));
}

/** How many answers differ from those in force: what a reading again would change. */
export function countChanges(before: WorkbookAnswers, after: WorkbookAnswers): number {
  const leaves = (value: unknown, path: string, into: Map<string, string>): Map<string, string> => {
    const isBranch = typeof value === 'object' && value !== null && !Array.isArray(value);
    // A column's answer counts once.
    if (!isBranch || /^\/sheets\/[^/]*\/columns\/[A-Z]+$/.test(path)) into.set(path, JSON.stringify(value));
    else for (const [name, one] of Object.entries(value)) leaves(one, `${path}/${name}`, into);
    return into;
  };
  const [one, other] = [leaves(before, '', new Map()), leaves(after, '', new Map())];
  const paths = new Set([...one.keys(), ...other.keys()]);
  return [...paths].filter((path) => one.get(path) !== other.get(path)).length;
}

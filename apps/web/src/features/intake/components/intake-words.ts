import type { IntakeProblem, IntakeState, IntakeView } from '@app/contracts';

export const STATE_WORDS: Record<IntakeState, string> = {
  received: 'received, being read',
  needs_attention: 'needs attention',
  queued: 'queued',
  working: 'working',
  scored: 'scored',
  refused: 'refused',
  withdrawn: 'withdrawn',
};

/** What a column is read as, in words. A role that is not known here is shown as it came. */
export function roleWords(role: string): string {
  return ROLE_WORDS[role] ?? role.replaceAll('_', ' ');
}
const ROLE_WORDS: Record<string, string> = {
  time: 'date and time',
  time_of_day: 'time of day',
  channel_values: 'readings of',
  ignored: 'not used',
};

export const SEVERITY_WORDS: Record<IntakeProblem['severity'], string> = {
  blocking: 'must be mended first',
  row_not_used: 'rows not used',
  cell_not_used: 'cells not used',
  notice: 'notices',
};
export const SEVERITIES = ['blocking', 'row_not_used', 'cell_not_used', 'notice'] as const;

/** Problems of one code, with how many there are in all; the list itself may hold only the first of them. */
export interface ProblemGroup {
  code: string;
  severity: IntakeProblem['severity'];
  count: number;
  problems: IntakeProblem[];
}

/** Groups by code, the gravest first, then the most frequent. */
export function groupProblems({
  problems,
  problemCounts,
}: Pick<IntakeView, 'problems' | 'problemCounts'>): ProblemGroup[] {
  const rank = (severity: IntakeProblem['severity']) => SEVERITIES.indexOf(severity);
  return problemCounts
    .map(({ code, severity, count }) => ({
      code,
      severity,
      count,
      problems: problems.filter((problem) => problem.code === code && problem.severity === severity),
    }))
    .sort((a, b) => rank(a.severity) - rank(b.severity) || b.count - a.count);
}

/** Where a problem stands: "Readings!E210", "Readings, column F", "Summary". */
export function cellName({ sheet, row, column }: Pick<IntakeProblem, 'sheet' | 'row' | 'column'>): string {
  if (row !== null && column !== null) return `${sheet}!${column}${row}`;
  if (row !== null) return `${sheet}, row ${row}`;
  return column === null ? sheet : `${sheet}, column ${column}`;
}

export const counted = (count: number, one: string, many = `${one}s`) =>
  `${count.toLocaleString('en-GB')} ${count === 1 ? one : many}`;

/** Size of a file: "84 kB", "2.3 MB". */
export function sizeWords(bytes: number): string {
  if (bytes < 1_000) return `${bytes} bytes`;
  return bytes < 1_000_000 ? `${Math.round(bytes / 1_000)}\u202fkB` : `${(bytes / 1_000_000).toFixed(1)}\u202fMB`;
}

/**
 * Each row is accounted for. Once the readings are stored: "2,240 rows read = 2,196 used + 32 already there + 12 not used"; before that
 * nobody knows yet what is there: "2,240 rows read = 2,228 to be stored or there already + 12 not used".
 */
export function accountingWords({ state, rowsRead, rowsUsed, rowsAlreadyThere, rowsNotUsed }: IntakeView): string {
  const number = (count: number) => count.toLocaleString('en-GB');
  const isStored = state === 'working' || state === 'scored';
  const usable = isStored
    ? `${number(rowsUsed)} used + ${number(rowsAlreadyThere)} already there`
    : `${number(rowsRead - rowsNotUsed)} to be stored or there already`;
  return `${counted(rowsRead, 'row')} read = ${usable} + ${number(rowsNotUsed)} not used`;
}

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
 * Each row is accounted for. Once the readings are stored: "2,240 rows read = 2,196 used + 32 already there + 12 not used", with those whose readings
 * supersede stored ones; before that, by what was stored when the workbook was read.
 */
export function accountingWords(intake: IntakeView): string {
  const { state, rowsRead, rowsUsed, rowsAlreadyThere, rowsSuperseding, rowsNotUsed, comparison } = intake;
  const number = (count: number) => count.toLocaleString('en-GB');
  const isStored = state === 'working' || state === 'scored' || state === 'withdrawn';
  const parts = isStored
    ? [
        `${number(rowsUsed)} used`,
        ...(rowsSuperseding > 0 ? [`${number(rowsSuperseding)} superseding`] : []),
        `${number(rowsAlreadyThere)} already there`,
      ]
    : comparison === null
      ? [`${number(rowsRead - rowsNotUsed)} to be stored or there already`]
      : [
          `${number(comparison.rowsNew)} new`,
          ...(comparison.rowsDiffering > 0
            ? [`${number(comparison.rowsDiffering)} with another value than stored`]
            : []),
          `${number(comparison.rowsAlreadyThere)} already there`,
        ];
  const notUsed = isStored || comparison === null ? rowsNotUsed : comparison.rowsNotUsed;
  return `${counted(rowsRead, 'row')} read = ${[...parts, `${number(notUsed)} not used`].join(' + ')}`;
}

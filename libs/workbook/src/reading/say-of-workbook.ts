import type { Choice, SheetGrid } from '../answers';
import type { WorkbookReport } from '../types';
import { leaveOut } from './missing-columns';
import { otherShapeOf, SHAPE_WORDS } from './other-shapes';
import { HEADER_WITHIN, type ReadingParts } from './sheet-reader';

const MAX_HEADER_CHOICES = 3;

/** Says what only the whole workbook shows: sheets without a header or left out, and that nothing could be read. */
export function sayOfWorkbook(report: WorkbookReport, leftOut: ReadonlySet<string>, parts: ReadingParts): void {
  const { findings, lots } = parts;
  const hasHeader = report.sheets.some((sheet) => sheet.headerRow !== null);
  report.sheets.forEach(({ name, headerRow, rows }, index) => {
    if (headerRow !== null || rows === 0) return;
    if (leftOut.has(name)) {
      const say = (): string => `is left out, as was said; nothing on it was read (${counted(rows)})`;
      findings.add('notice', 'sheet-left-out', { sheet: name }, say);
    } else sayNoHeader(report.grids[index], rows, hasHeader, parts);
  });
  if (lots.readings === 0 && findings.countOf('blocking') === 0) {
    const sheet = report.sheets[0]?.name ?? '';
    findings.add('blocking', 'no-readings', { sheet }, () => 'and the rest of the workbook give no reading at all');
  }
}

function sayNoHeader(grid: SheetGrid, rows: number, hasHeader: boolean, parts: ReadingParts): void {
  const { findings, questions, channels } = parts;
  const { sheet } = grid;
  const shape = otherShapeOf(grid, channels);
  if (shape !== null) {
    if (hasHeader) questions.ask(shape, { sheet }, SHAPE_WORDS[shape], rows, [leaveOut(sheet)]);
    else findings.add('blocking', shape, { sheet }, () => SHAPE_WORDS[shape]);
    return;
  }
  const text = `has no header row in its first ${HEADER_WITHIN} rows (one that names time, lot and value, or time, lot and channels), so nothing on it was read (${counted(rows)})`;
  if (hasHeader) findings.add('notice', 'no-header', { sheet }, () => text);
  else questions.ask('no-header', { sheet }, `${text}; which row is the header?`, rows, headerChoices(grid));
}

/** The rows with the most texts, as they may be the header, and leaving the sheet out. */
function headerChoices({ sheet, rows }: SheetGrid): Choice[] {
  const textsOf = (cells: Record<string, string>): string[] =>
    Object.values(cells).filter((text) => /\p{L}/u.test(text));
  const likely = rows
    .map(({ row, cells }) => ({ row, texts: textsOf(cells) }))
    .filter(({ texts }) => texts.length > 1)
    .sort((one, other) => other.texts.length - one.texts.length || one.row - other.row)
    .slice(0, MAX_HEADER_CHOICES);
  const choices = likely.map(({ row, texts }) => ({
    label: `Row ${row} is the header: ${texts.slice(0, 4).join(', ').slice(0, 80)}`,
    answers: { sheets: { [sheet]: { headerRow: row } } },
  }));
  return [...choices, leaveOut(sheet)];
}

const counted = (rows: number): string => (rows === 1 ? 'one row' : `${rows} rows`);

import type { Problem, Severity } from '../types';
import { escapeFormula } from '../write-table';
import { escapeXml } from './xml-edit';

const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const EFFECT: Record<Severity, string> = {
  blocking: 'nothing can be taken in until this is mended',
  row_not_used: 'row not used',
  cell_not_used: 'cell not used',
  notice: 'notice',
};
const HEADER = ['Sheet', 'Cell', 'What it means for the intake', 'Problem'];
const WIDTHS = [18, 10, 30, 110];

/** The XML of a sheet that lists problems, each with a link to its cell where the workbook has the sheet. */
export function problemsSheetXml(problems: readonly Problem[], sheetNames: ReadonlySet<string>): string {
  const links: string[] = [];
  const rows = [HEADER, ...problems.map((problem, index) => rowOf(problem, index + 2, sheetNames, links))];
  const body = rows.map((cells, index) => {
    const xml = cells.map((text, at) => {
      const name = `${'ABCD'[at]}${index + 1}`;
      return `<c r="${name}" t="inlineStr"><is><t xml:space="preserve">${escapeXml(escapeFormula(text))}</t></is></c>`;
    });
    return `<row r="${index + 1}">${xml.join('')}</row>`;
  });
  const columns = WIDTHS.map(
    (width, index) => `<col min="${index + 1}" max="${index + 1}" width="${width}" customWidth="1"/>`,
  );
  return [
    `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n<worksheet xmlns="${MAIN}">`,
    '<sheetViews><sheetView workbookViewId="0"><pane ySplit="1" topLeftCell="A2" activePane="bottomLeft" state="frozen"/></sheetView></sheetViews>',
    `<cols>${columns.join('')}</cols><sheetData>${body.join('')}</sheetData><autoFilter ref="A1:D${rows.length}"/>`,
    links.length > 0 ? `<hyperlinks>${links.join('')}</hyperlinks>` : '',
    '</worksheet>',
  ].join('');
}

function rowOf(problem: Problem, number: number, sheetNames: ReadonlySet<string>, links: string[]): string[] {
  const { sheet, row, column, severity, detail } = problem;
  const cell = row === null ? null : `${column ?? 'A'}${row}`;
  if (cell && sheetNames.has(sheet)) {
    links.push(`<hyperlink ref="B${number}" location="${escapeXml(`'${sheet.replace(/'/g, "''")}'!${cell}`)}"/>`);
  }
  const label = row === null ? (column ?? '') : column === null ? `row ${row}` : `${column}${row}`;
  return [sheet, label, EFFECT[severity], detail];
}

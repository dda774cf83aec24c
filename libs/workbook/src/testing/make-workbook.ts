import { columnLetters } from '../container/cell-names';
import { writeZip, type ZipPart } from './zip-writer';

/** A number with a style, a text, an error, a formula (without a result unless given), or nothing. */
export type CellSpec =
  | null
  | string
  | number
  | { date: number }
  | { day: number }
  | { clock: number }
  | { percent: number }
  | { error: string }
  | { formula: string; result?: number };

export interface SheetSpec {
  name: string;
  rows: CellSpec[][];
  state?: 'hidden' | 'veryHidden';
  hiddenRows?: number[];
  /** Numbers from 1. */
  hiddenColumns?: number[];
  merged?: string[];
  /** Leaves the `r` attributes out, as some programs do. */
  isWithoutNames?: boolean;
}

export interface BookSpec {
  sheets: SheetSpec[];
  is1904?: boolean;
}

const NS = 'http://schemas.openxmlformats.org';
const RELATION = `${NS}/officeDocument/2006/relationships`;
const escape = (text: string): string =>
  text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');

/** Styles by index: general, date with time, day, time of day, percentage. */
const STYLES = `<styleSheet xmlns="${NS}/spreadsheetml/2006/main"><numFmts count="1"><numFmt numFmtId="164" formatCode="yyyy\\-mm\\-dd\\ hh:mm"/></numFmts><cellXfs count="5"><xf numFmtId="0"/><xf numFmtId="164"/><xf numFmtId="14"/><xf numFmtId="20"/><xf numFmtId="10"/></cellXfs></styleSheet>`;

function cellXml(spec: CellSpec, name: string): string {
  if (spec === null) return '';
  if (typeof spec === 'string') return `<c${name} t="inlineStr"><is><t>${escape(spec)}</t></is></c>`;
  if (typeof spec === 'number') return `<c${name}><v>${spec}</v></c>`;
  if ('error' in spec) return `<c${name} t="e"><v>${spec.error}</v></c>`;
  if ('formula' in spec) {
    return `<c${name}><f>${spec.formula}</f>${spec.result === undefined ? '' : `<v>${spec.result}</v>`}</c>`;
  }
  const [[kind, number]] = Object.entries(spec);
  return `<c${name} s="${['general', 'date', 'day', 'clock', 'percent'].indexOf(kind)}"><v>${number}</v></c>`;
}

function sheetXml({ rows, hiddenRows = [], hiddenColumns = [], merged = [], isWithoutNames }: SheetSpec): string {
  const body = rows.map((row, index) => {
    const number = index + 1;
    const cells = row.map((cell, at) => cellXml(cell, isWithoutNames ? '' : ` r="${columnLetters(at + 1)}${number}"`));
    const hidden = hiddenRows.includes(number) ? ' hidden="1"' : '';
    return `<row${isWithoutNames ? '' : ` r="${number}"`}${hidden}>${cells.join('')}</row>`;
  });
  const columns =
    hiddenColumns.length > 0
      ? `<cols>${hiddenColumns.map((one) => `<col min="${one}" max="${one}" width="9" hidden="1"/>`).join('')}</cols>`
      : '';
  const merges =
    merged.length > 0 ? `<mergeCells>${merged.map((ref) => `<mergeCell ref="${ref}"/>`).join('')}</mergeCells>` : '';
  return `<worksheet xmlns="${NS}/spreadsheetml/2006/main">${columns}<sheetData>${body.join('')}</sheetData>${merges}</worksheet>`;
}

/** The parts of a workbook around sheets whose XML is given. */
export function wrapSheets(
  sheets: { name: string; state?: string; xml: ZipPart['data'] }[],
  is1904 = false,
): ZipPart[] {
  const list = sheets.map(
    ({ name, state }, index) =>
      `<sheet name="${escape(name)}" sheetId="${index + 1}"${state ? ` state="${state}"` : ''} r:id="rId${index + 1}"/>`,
  );
  const relations = sheets.map(
    (_, index) =>
      `<Relationship Id="rId${index + 1}" Type="${RELATION}/worksheet" Target="worksheets/sheet${index + 1}.xml"/>`,
  );
  const head = '<?xml version="1.0" encoding="UTF-8"?>';
  const types = `${NS}/package/2006`;
  return [
    {
      name: '[Content_Types].xml',
      data: `${head}<Types xmlns="${types}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml"/></Types>`,
    },
    {
      name: '_rels/.rels',
      data: `${head}<Relationships xmlns="${types}/relationships"><Relationship Id="rId1" Type="${RELATION}/officeDocument" Target="xl/workbook.xml"/></Relationships>`,
    },
    ...sheets.map(({ xml }, index) => ({ name: `xl/worksheets/sheet${index + 1}.xml`, data: xml })),
    {
      name: 'xl/workbook.xml',
      data: `${head}<workbook xmlns="${NS}/spreadsheetml/2006/main" xmlns:r="${RELATION}"><workbookPr${is1904 ? ' date1904="1"' : ''}/><sheets>${list.join('')}</sheets></workbook>`,
    },
    {
      name: 'xl/_rels/workbook.xml.rels',
      data: `${head}<Relationships xmlns="${types}/relationships">${relations.join('')}<Relationship Id="rIdS" Type="${RELATION}/styles" Target="styles.xml"/></Relationships>`,
    },
    { name: 'xl/styles.xml', data: STYLES },
  ];
}

/** Writes a small .xlsx by hand, so that what it says is known to the byte. */
export const makeWorkbook = ({ sheets, is1904 }: BookSpec): Buffer =>
  writeZip(
    wrapSheets(
      sheets.map((sheet) => ({ ...sheet, xml: sheetXml(sheet) })),
      is1904,
    ),
  );

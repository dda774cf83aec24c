import { columnLetters } from '../container/cell-names';
import type { Source } from '../container/open-source';
import type { SheetRow } from '../container/sheet-rows';
import { escapeXml } from './xml-edit';
import { packPart, writeArchive } from './zip-bytes';

const OFFICE = 'http://schemas.openxmlformats.org';
const RELATION = `${OFFICE}/officeDocument/2006/relationships`;
const MAIN = `${OFFICE}/spreadsheetml/2006/main`;
const TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml';
const HEAD = '<?xml version="1.0" encoding="UTF-8"?>';
/** Characters that XML cannot hold. */
const FORBIDDEN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ud800-\udfff\ufffe\uffff]/gu;
/** The last row of a sheet. */
const MAX_ROW = 1_048_576;

/** A text file as a workbook of one sheet: each cell a text where it stood, so that nothing in it is turned into another. */
export async function textAsWorkbook(source: Source): Promise<Buffer> {
  const [{ name }] = source.sheets;
  const rows: string[] = [];
  for await (const some of source.rows(source.sheets[0])) rows.push(some.map(rowXml).join(''));
  const part = (path: string, xml: string) => packPart(path, HEAD + xml);
  return writeArchive([
    part(
      '[Content_Types].xml',
      `<Types xmlns="${OFFICE}/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="${TYPE}.sheet.main+xml"/><Override PartName="/xl/worksheets/sheet1.xml" ContentType="${TYPE}.worksheet+xml"/><Override PartName="/xl/styles.xml" ContentType="${TYPE}.styles+xml"/></Types>`,
    ),
    part('_rels/.rels', relations([['rId1', 'officeDocument', 'xl/workbook.xml']])),
    part(
      'xl/workbook.xml',
      `<workbook xmlns="${MAIN}" xmlns:r="${RELATION}"><sheets><sheet name="${escapeXml(name)}" sheetId="1" r:id="rId1"/></sheets></workbook>`,
    ),
    part(
      'xl/_rels/workbook.xml.rels',
      relations([
        ['rId1', 'worksheet', 'worksheets/sheet1.xml'],
        ['rId2', 'styles', 'styles.xml'],
      ]),
    ),
    part('xl/styles.xml', STYLES),
    part('xl/worksheets/sheet1.xml', `<worksheet xmlns="${MAIN}"><sheetData>${rows.join('')}</sheetData></worksheet>`),
  ]);
}

const STYLES = `<styleSheet xmlns="${MAIN}"><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/></cellXfs></styleSheet>`;

const relations = (list: readonly (readonly [string, string, string])[]): string =>
  `<Relationships xmlns="${OFFICE}/package/2006/relationships">${list
    .map(([id, kind, target]) => `<Relationship Id="${id}" Type="${RELATION}/${kind}" Target="${target}"/>`)
    .join('')}</Relationships>`;

function rowXml({ number, cells }: SheetRow): string {
  if (number > MAX_ROW) return '';
  let xml = '';
  for (const [column, cell] of cells.entries()) {
    if (!cell) continue;
    const text = escapeXml(cell.text.replace(FORBIDDEN, '\ufffd'));
    xml += `<c r="${columnLetters(column)}${number}" t="inlineStr"><is><t xml:space="preserve">${text}</t></is></c>`;
  }
  return `<row r="${number}">${xml}</row>`;
}

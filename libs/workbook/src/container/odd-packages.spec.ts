import { DEFAULT_LIMITS } from '../limits';
import { wrapSheets } from '../testing/make-workbook';
import { writeZip, type ZipPart } from '../testing/zip-writer';
import { openSource } from './open-source';

const SHEET =
  '<worksheet><sheetData><row r="1"><c r="A1" t="inlineStr"><is><t xml:space="preserve"> a </t></is></c><c r="B1" t="d"><v>2026-02-02T06:00:00</v></c><c r="C1"><f t="shared" ref="C1:C2" si="0">1+1</f><v>2</v></c></row></sheetData></worksheet>';
const PARTS = wrapSheets([{ name: 'S', xml: SHEET }]) as (ZipPart & { data: string })[];
const CONTENTS = { S: [' a ', '2026-02-02T06:00:00', 2] };

const edit = (name: string, change: (text: string) => string | Buffer): ZipPart[] =>
  PARTS.map((part) => (part.name.endsWith(name) ? { ...part, data: change(part.data) } : part));

/** What each sheet holds in its first row, by its name. */
async function contents(parts: ZipPart[]): Promise<Record<string, (string | number | undefined)[]>> {
  const source = await openSource(writeZip(parts), DEFAULT_LIMITS, {});
  const found: Record<string, (string | number | undefined)[]> = {};
  for (const sheet of source.sheets) {
    found[sheet.name] = [];
    for await (const [row] of source.rows(sheet)) {
      const cells = Array.from(row.cells.slice(1));
      found[sheet.name].push(...cells.map((cell) => (cell?.kind === 'number' ? cell.number : cell?.text)));
    }
  }
  return found;
}

const utf16 = (text: string): Buffer => Buffer.from(text.replace('UTF-8', 'UTF-16'), 'utf16le');

describe('packages that other programs write', () => {
  it.each<[string, ZipPart[]]>([
    ['plain', PARTS],
    ['targets from the root', edit('workbook.xml.rels', (text) => text.replace('"worksheets/', '"/xl/worksheets/'))],
    ['targets with a detour', edit('workbook.xml.rels', (text) => text.replace('"worksheets/', '"../xl/worksheets/'))],
    [
      'the strict names of ISO/IEC 29500',
      PARTS.map((part) => ({
        ...part,
        data: part.data.replace(
          /http:\/\/schemas\.openxmlformats\.org\/(officeDocument\/2006|spreadsheetml\/2006)/g,
          (_, kind: string) => `http://purl.oclc.org/ooxml/${kind.split('/')[0]}`,
        ),
      })),
    ],
    ['UTF-16 with a mark', edit('sheet1.xml', (text) => utf16(`\ufeff${text}`))],
    ['UTF-16 the other way round', edit('sheet1.xml', (text) => utf16(`\ufeff${text}`).swap16())],
    ['UTF-16 without a mark', edit('sheet1.xml', utf16)],
    ['UTF-16 in every part', PARTS.map((part) => ({ ...part, data: utf16(`\ufeff${part.data}`) }))],
    ['UTF-8 with a mark', edit('workbook.xml', (text) => `\ufeff${text}`)],
    ['names in capitals', PARTS.map((part) => ({ ...part, name: part.name.toUpperCase() }))],
    ['backslashes in the names', PARTS.map((part) => ({ ...part, name: part.name.replace(/\//g, '\\') }))],
    ['without styles', PARTS.filter(({ name }) => !name.includes('styles'))],
    ['without _rels/.rels', PARTS.filter(({ name }) => name !== '_rels/.rels')],
    ['with macros, which are left alone', [...PARTS, { name: 'xl/vbaProject.bin', data: 'MsgBox "no"' }]],
    [
      'no shared texts in a part for them',
      [
        ...edit('workbook.xml.rels', (text) =>
          text.replace('</', '<Relationship Id="t" Type="x/sharedStrings" Target="sharedStrings.xml"/></'),
        ),
        { name: 'xl/sharedStrings.xml', data: '<sst count="0"/>' },
      ],
    ],
  ])('%s', async (_, parts) => {
    expect(await contents(parts)).toEqual(CONTENTS);
  });

  it('a sheet that is a chart is passed over', async () => {
    const parts = [
      ...PARTS.map((part) =>
        part.name.endsWith('workbook.xml.rels')
          ? {
              ...part,
              data: part.data.replace(
                '</Relationships>',
                '<Relationship Id="rIdC" Type="x/chartsheet" Target="chartsheets/sheet1.xml"/></Relationships>',
              ),
            }
          : part,
      ),
      { name: 'xl/chartsheets/sheet1.xml', data: '<chartsheet/>' },
    ].map((part) =>
      part.name === 'xl/workbook.xml'
        ? { ...part, data: part.data.replace('<sheets>', '<sheets><sheet name="C" sheetId="9" r:id="rIdC"/>') }
        : part,
    );
    expect(await contents(parts)).toEqual(CONTENTS);
  });
  it('a sheet that leads nowhere makes the file damaged, and is not passed over', async () => {
    const parts = edit('workbook.xml', (text) =>
      text.replace('<sheets>', '<sheets><sheet name="N" sheetId="9" r:id="no"/>'),
    );
    await expect(contents(parts)).rejects.toMatchObject({ code: 'corrupt' });
  });
});

describe('archives that are no workbooks say what to do', () => {
  it.each<[string, string[], RegExp]>([
    ['an OpenDocument spreadsheet', ['mimetype', 'content.xml', 'META-INF/manifest.xml'], /\.ods.*"Save as"/],
    ['a Numbers spreadsheet', ['Index/Document.iwa'], /Numbers.*"Export to", "Excel"/],
    ['a text document', ['word/document.xml', '[Content_Types].xml'], /text document.*workbook/],
    ['an archive of workbooks', ['week 9/monday.xlsx', 'week 9/tuesday.csv'], /Unpack it/],
  ])('%s', async (_, names, sentence) => {
    const bytes = writeZip(names.map((name) => ({ name, data: 'x' })));
    await expect(openSource(bytes, DEFAULT_LIMITS, {})).rejects.toMatchObject({
      code: 'not-excel',
      detail: expect.stringMatching(sentence),
    });
  });
  it.each<[string, Buffer, RegExp]>([
    ['a PDF', Buffer.from('%PDF-1.7\n%\xe2\xe3\xcf\xd3\n1 0 obj', 'latin1'), /PDF.*Upload the workbook/],
    ['a photo', Buffer.from([0xff, 0xd8, 0xff, 0xe0, 0, 16, 0x4a]), /picture.*Upload the workbook/],
    ['a web page under the name of a workbook', Buffer.from('\n<html><table><tr><td>1</td></tr>'), /"Save as"/],
    ['an XML table', Buffer.from('\ufeff<?xml version="1.0"?><Workbook/>'), /"Save as"/],
    ['a web page in UTF-16', Buffer.from('\ufeff<html><body>', 'utf16le'), /"Save as"/],
    ['a formatted text', Buffer.from('{\\rtf1\\ansi x}'), /formatted text/],
    ['an old workbook without a container', Buffer.from([9, 4, 6, 0, 0, 0, 0x10, 0]), /older Excel format/],
    ['bytes of any kind', Buffer.from([1, 2, 3, 4, 0, 5, 6, 0]), /not an Excel workbook/],
  ])('%s', async (_, bytes, sentence) => {
    await expect(openSource(bytes, DEFAULT_LIMITS, {})).rejects.toMatchObject({
      detail: expect.stringMatching(sentence),
    });
  });
});

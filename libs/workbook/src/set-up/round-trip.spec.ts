import fc from 'fast-check';
import { Workbook } from 'exceljs';
import { ROLES } from '@app/contracts';
import { editBook, SET_UP } from '../testing/set-up';
import type { SetUpDocument } from './document';
import { readSetUp } from './read-set-up';
import { SHEETS } from './sheets';
import { escapeText, unescapeText } from './texts';
import { writeSetUp } from './write-set-up';

const TIME_ZONE = 'Europe/London';

async function load(bytes: Buffer): Promise<Workbook> {
  const book = new Workbook();
  await book.xlsx.load(bytes as unknown as ArrayBuffer);
  return book;
}

const name = fc
  .string({ unit: fc.constantFrom(...'aZ9 =+-@\';,."µé²/<&_x'), minLength: 1, maxLength: 12 })
  .map((text) => text.trim())
  .filter((text) => text !== '' && !/;;;|^;|;$|; |_x/.test(text));
const names = (minLength: number) => fc.uniqueArray(name, { minLength, maxLength: 4 });
const amount = fc.double({ min: 1e-9, max: 1e9, noNaN: true, noDefaultInfinity: true });
/** Some of them within the hours that clocks show twice. */
const instant = fc.oneof(
  fc.integer({ min: Date.UTC(1990, 0, 1), max: Date.UTC(2090, 0, 1) }),
  fc.integer({ min: Date.parse('2026-10-24T23:30:00Z'), max: Date.parse('2026-10-25T02:30:00Z') }),
);
const pick = <T>(items: readonly T[]) => fc.constantFrom(...items);

const documents: fc.Arbitrary<SetUpDocument> = fc
  .tuple(names(1), names(1), names(1), names(1), pick(['Europe/London', 'America/St_Johns', 'Asia/Kolkata', 'UTC']))
  .chain(([lines, products, characteristics, gauges, timeZone]) =>
    fc.record({
      plant: fc.tuple(
        fc.record({
          name,
          timeZone: fc.constant(timeZone),
          currency: pick([null, 'EUR']),
          engineerMayRelease: fc.boolean(),
          reminderManagerHours: fc.constant(7.5),
          reminderDirectorHours: fc.double({ min: 7.5, max: 1000, noNaN: true }),
          allowanceNoticePercent: fc.double({ min: 0.1, max: 20, noNaN: true }),
          allowanceCapPercent: fc.double({ min: 20, max: 90, noNaN: true }),
        }),
      ),
      shifts: fc.constant([
        { name: 'early', startsAt: '05:45', endsAt: '14:00', validFrom: '2026-02-28' },
        { name: 'rest', startsAt: '14:00', endsAt: '05:45', validFrom: '2026-02-28' },
      ]),
      lines: fc.constant(lines.map((line) => ({ name: line }))),
      products: fc.tuple(
        ...products.map((code) =>
          fc.record({ code: fc.constant(code), name, valuePerUnit: fc.option(amount, { nil: null }) }),
        ),
      ),
      characteristics: fc.tuple(
        ...characteristics.map((one) =>
          fc.record({ name: fc.constant(one), unit: pick(['', 'g/m²', '=µm']), resolution: amount }),
        ),
      ),
      specifications: fc.uniqueArray(
        fc.record({
          product: pick(products),
          characteristic: pick(characteristics),
          nominal: fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0),
          lower: pick([null, -3.25, 1e-7]),
          upper: pick([17, 1e6]),
          appliesToIndividuals: fc.boolean(),
          validFrom: fc.option(instant, { nil: null }),
        }),
        { selector: ({ product, characteristic }) => JSON.stringify([product, characteristic]), maxLength: 4 },
      ),
      gauges: fc.tuple(
        ...gauges.map((assetNumber) => fc.record({ assetNumber: fc.constant(assetNumber), kind: name })),
      ),
      channels: fc.uniqueArray(
        fc
          .record({ line: pick(lines), name, characteristic: pick(characteristics), gauge: pick(gauges), at: instant })
          .map(({ at, ...channel }) => ({ ...channel, position: channel.name, gaugeSince: at })),
        { selector: (channel) => JSON.stringify([channel.line, channel.name]), maxLength: 4 },
      ),
      people: fc.uniqueArray(
        fc.record({
          email: fc.integer({ min: 1, max: 99 }).map((number) => `person.${number}@marrowby.example`),
          name,
          roles: fc.subarray([...ROLES], { minLength: 1 }),
          lines: fc.subarray(lines),
        }),
        { selector: ({ email }) => email, maxLength: 3 },
      ),
    }),
  );

describe('a set-up as a workbook', () => {
  it('comes back as it went out', async () => {
    const reading = await readSetUp(await writeSetUp(SET_UP), { timeZone: TIME_ZONE });
    expect(reading.problems).toEqual([]);
    expect(reading.notices).toEqual([]);
    expect(reading.document).toEqual(SET_UP);
    expect(reading.places.specifications).toMatchObject({ rows: [2, 3], columns: { lower: 'D', validFrom: 'G' } });
  });

  it('does so whatever is in it: names like formulas, hours that clocks show twice, every finite number', async () => {
    await fc.assert(
      fc.asyncProperty(documents, async (document) => {
        const { document: read, problems } = await readSetUp(await writeSetUp(document), { timeZone: TIME_ZONE });
        expect(problems).toEqual([]);
        expect(read).toEqual(document);
      }),
      { numRuns: 25 },
    );
  }, 60_000);

  it('may be opened and saved by another program in between', async () => {
    const saved = await editBook(await writeSetUp(SET_UP), () => undefined);
    expect((await readSetUp(saved, { timeZone: TIME_ZONE })).document).toEqual(SET_UP);
  });

  it('holds real numbers, dates and times under frozen headers with units and filters', async () => {
    const book = await load(await writeSetUp(SET_UP));
    expect(book.worksheets.map((sheet) => sheet.name)).toEqual([
      'Read this first',
      ...SHEETS.map((sheet) => sheet.name),
    ]);
    for (const sheet of book.worksheets.slice(1)) {
      expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 });
      expect(sheet.autoFilter).toMatch(/^A1:/);
    }
    const specifications = book.getWorksheet('Specifications')!;
    expect(specifications.getCell('D1').value).toBe('Lower specification limit [unit of the characteristic]');
    expect(specifications.getCell('D2').value).toBe(19.2);
    expect(specifications.getCell('G2').value).toEqual(new Date('2026-01-05T07:00:00Z'));
    expect(book.getWorksheet('Shifts')!.getCell('B2').numFmt).toBe('hh:mm');
    expect(book.getWorksheet('Channels')!.getCell('E3').dataValidation).toMatchObject({
      type: 'list',
      formulae: ['Gauges!$A$2:$A$5001'],
    });
  });

  it('explains every column in a sentence', async () => {
    const first = (await load(await writeSetUp(SET_UP))).worksheets[0];
    const said = new Map<string, string>();
    first.eachRow((row) => said.set(`${row.getCell(1).text}/${row.getCell(2).text}`, row.getCell(4).text));
    for (const { name: sheet, columns } of SHEETS)
      for (const { header, unit, wants } of columns) {
        expect(said.get(`${sheet}/${header}${unit ? ` [${unit}]` : ''}`)).toBe(wants);
        expect(wants).toMatch(/^[A-Z].*\.$/);
      }
  });

  it('makes texts harmless, and gives them back', () => {
    expect(['=1+1', '+4', '-x', '@a', "'=a", 'a=b', "'quoted'"].map(escapeText)).toEqual([
      "'=1+1",
      "'+4",
      "'-x",
      "'@a",
      "''=a",
      'a=b',
      "'quoted'",
    ]);
    fc.assert(fc.property(fc.string(), (text) => expect(unescapeText(escapeText(text))).toBe(text)));
  });
});

import { mergeAnswers } from '@app/contracts';
import fc from 'fast-check';
import type { ColumnRole, LayoutAnswers, Question, WorkbookAnswers } from './answers';
import { CORPUS, nameOfChannel, type CorpusFile, type ExpectedReading } from './testing/corpus';
import type { Read } from './testing/coater';

/** What a conversion between units may lose in double arithmetic; everything else is the same number. */
const RELATIVE = 1e-12;

const place = ({ row, column }: { row: number; column: string }): string => `${row} ${column.padStart(3)}`;

/** The readings in the words of the expectation, with what that leaves open left out. */
function inItsWords({ readings }: Read, { context, expected }: CorpusFile): ExpectedReading[] {
  const said = new Map(expected.readings.map((one) => [`${one.sheet} ${place(one)}`, one]));
  const isText = expected.readings.some((one) => one.sheet === '*');
  return readings.map((reading) => {
    const sheet = isText ? '*' : reading.sheet;
    const known = said.get(`${sheet} ${place(reading)}`);
    const isClose =
      known?.value != null &&
      reading.value !== null &&
      Math.abs(reading.value - known.value) <= RELATIVE * Math.abs(known.value);
    return {
      sheet,
      row: reading.row,
      column: reading.column,
      lot: reading.lot,
      product: reading.product,
      channel: nameOfChannel(context, reading.channelId) ?? '',
      at: new Date(reading.at).toISOString().replace('.000Z', 'Z'),
      value: isClose ? known.value : reading.value,
      censoring: reading.censoring,
      ...(known?.serial === undefined ? {} : { serial: reading.serial ?? undefined }),
      ...(known?.position === undefined ? {} : { position: reading.position ?? undefined }),
    };
  });
}

/** The first readings that only one side has, so that a failure can be read. */
function differing(
  read: ExpectedReading[],
  wanted: ExpectedReading[],
): { count: number; missing: string[]; unexpected: string[] } {
  const lines = (readings: ExpectedReading[]): string[] =>
    readings.map((one) => JSON.stringify(one, Object.keys(one).sort()));
  const only = (ones: string[], others: string[]): string[] => {
    const known = new Set(others);
    return ones.filter((one) => !known.has(one)).slice(0, 3);
  };
  const [have, want] = [lines(read), lines(wanted)];
  return { count: have.length, missing: only(want, have), unexpected: only(have, want) };
}

const codes = ({ report }: Read): string[] => [...new Set(report.questions.map((question) => question.code))].sort();

function countsByCode({ report }: Read): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const { code, count } of report.problemCounts) counts[code] = (counts[code] ?? 0) + count;
  return counts;
}

const isRefused = ({ expected }: CorpusFile): boolean => expected.refused !== undefined;

describe('workbooks as plants have them', () => {
  it.each(CORPUS.filter(isRefused).map((file) => [file.name, file] as const))(
    '%s is turned away with a sentence',
    async (_, file) => {
      await expect(file.read()).rejects.toMatchObject({ code: file.expected.refused });
    },
  );

  it.each(CORPUS.filter((file) => !isRefused(file)).map((file) => [file.name, file] as const))(
    '%s gives the rows that were put in',
    async (_, file) => {
      const { answers, expected } = file;
      const unanswered = await file.read();
      expect(codes(unanswered)).toEqual(expected.questions ?? []);
      const result = answers ? await file.read(answers) : unanswered;
      expect(codes(result)).toEqual([]);
      expect(differing(inItsWords(result, file), expected.readings)).toEqual({
        count: expected.readings.length,
        missing: [],
        unexpected: [],
      });
      expect({
        layout: result.report.layout,
        isBlocked: result.report.isBlocked,
        rowsRead: result.report.rowsRead,
        rowsNotUsed: result.report.rowsNotUsed,
      }).toEqual({
        layout: expected.layout ?? result.report.layout,
        isBlocked: expected.isBlocked ?? false,
        rowsRead: expected.rowsRead,
        rowsNotUsed: expected.rowsNotUsed,
      });
      expect(countsByCode(result)).toMatchObject(expected.problemCodes ?? {});
    },
  );
});

/** What is offered; a day is typed. */
const waysToAnswer = ({ code, choices }: Question, { answers }: CorpusFile): WorkbookAnswers[] =>
  code === 'date-missing' ? [{ date: answers?.date }] : choices.map((choice) => choice.answers);

/** Takes the choices that are offered, each with all others, until nothing is asked or the rows are those put in. */
async function leadsThere(file: CorpusFile, answers: WorkbookAnswers, depth: number): Promise<boolean> {
  const result = await file.read(answers);
  const [question] = result.report.questions;
  if (question === undefined) {
    const { missing, unexpected } = differing(inItsWords(result, file), file.expected.readings);
    return missing.length + unexpected.length === 0;
  }
  if (depth === 0) return false;
  for (const answer of waysToAnswer(question, file)) {
    if (await leadsThere(file, mergeAnswers(answers, answer), depth - 1)) return true;
  }
  return false;
}

describe('questions', () => {
  it.each(CORPUS.filter(({ answers }) => answers !== undefined).map((file) => [file.name, file] as const))(
    '%s is read as it was meant by taking choices that are offered',
    async (_, file) => {
      const { questions } = (await file.read()).report;
      for (const { code, detail, choices, rows } of questions) {
        expect(detail).toMatch(/[?.]$/);
        expect(code === 'date-missing' || choices.length > 1).toBe(true);
        expect(rows).toBeGreaterThan(0);
      }
      expect(await leadsThere(file, {}, 5)).toBe(true);
    },
  );
});

/** Every row is either used or named once, and all that is counted adds up. */
function expectAccounted({ report, readings }: Read): void {
  const at = ({ sheet, row }: { sheet: string; row: number | null }): string => `${sheet} ${row}`;
  const used = new Set(readings.map(at));
  const notUsed = report.problems.filter((problem) => problem.severity === 'row_not_used').map(at);
  expect(report.rowsRead).toBe(used.size + report.rowsNotUsed);
  expect(notUsed).toHaveLength(report.rowsNotUsed);
  expect(new Set(notUsed).size).toBe(notUsed.length);
  expect(notUsed.filter((row) => used.has(row))).toEqual([]);
  expect(report.readingsParsed).toBe(readings.length);
  expect(report.lots.reduce((sum, lot) => sum + lot.readings, 0)).toBe(readings.length);
  expect(report.isBlocked).toBe(report.problemCounts.some(({ severity }) => severity === 'blocking'));
}

const ROLES: ColumnRole[] = ['time', 'date', 'time_of_day', 'lot', 'product', 'channel', 'value', 'unit', 'ignored'];

/** Answers as a person might give them, rightly or wrongly. */
const layoutAnswers = ({ context }: CorpusFile): fc.Arbitrary<LayoutAnswers> => {
  const channel = fc.constantFrom(...context.channels);
  const column = fc.oneof(
    fc.constantFrom(...ROLES).map((role) => ({ role })),
    channel.map(({ id }) => ({ role: 'channel_values' as const, channelId: id })),
    channel.map(({ id, unit }) => ({ role: 'channel_values' as const, channelId: id, unit, isDeviation: true })),
  );
  return fc.record(
    {
      headerRow: fc.constantFrom(null, 1, 2, 3, 7),
      columns: fc.dictionary(fc.constantFrom('A', 'B', 'C', 'D', 'E', 'F'), column, { maxKeys: 3 }),
      dateOrder: fc.constantFrom('day-month' as const, 'month-day' as const),
      decimalSign: fc.constantFrom('.' as const, ',' as const),
      timeZone: fc.constantFrom('America/New_York', 'Europe/Berlin', 'UTC'),
      missing: fc.subarray(['0', '9999', 'OL', '12', '16.4']),
      isShiftDate: fc.boolean(),
    },
    { requiredKeys: [] },
  );
};

const workbookAnswers = (file: CorpusFile, sheets: string[]): fc.Arbitrary<WorkbookAnswers> =>
  fc.record(
    {
      sheets: fc.dictionary(fc.constantFrom(...sheets), layoutAnswers(file)),
      date: fc.constantFrom('2026-03-02', '2026-03-29'),
      repeatedHour: fc.constantFrom('first' as const, 'second' as const),
      lots: fc.constantFrom<Record<string, string>>({ 'L-0124': 'L-0123' }, { '24117': 'A' }),
    },
    { requiredKeys: [] },
  );

describe('every row of every file is accounted for', () => {
  it.each(CORPUS.filter((file) => !isRefused(file)).map((file) => [file.name, file] as const))(
    '%s, whatever is answered',
    async (_, file) => {
      const plain = await file.read();
      expectAccounted(plain);
      const sheets = plain.report.sheets.map(({ name }) => name);
      await fc.assert(
        fc.asyncProperty(workbookAnswers(file, sheets), async (answers) => expectAccounted(await file.read(answers))),
        { numRuns: 12 },
      );
    },
  );
});

import type { WorkbookAnswers } from './answers';
import { COATER, problemList, read } from './testing/coater';
import { makeWorkbook, type CellSpec } from './testing/make-workbook';

/** Reads rows of times under their headers, in the long layout. */
async function times(
  headers: string[],
  stamps: CellSpec[][],
  answers: WorkbookAnswers = {},
  name = 'S',
  now = COATER.now,
) {
  const rows = [
    [...headers, 'Lot', 'Product', 'Channel', 'Value'],
    ...stamps.map((stamp, index): CellSpec[] => [...stamp, 'A', 'SEP-12', 'CW', 12 + index / 10]),
  ];
  const context = { ...COATER, now };
  const result = await read(makeWorkbook({ sheets: [{ name, rows }] }), context, { answers });
  const [question] = result.report.questions;
  return {
    result,
    question,
    codes: result.report.questions.map(({ code }) => code),
    at: result.readings.map(({ at }) => new Date(at).toISOString().slice(0, 16)),
  };
}
const one = (...texts: string[]): CellSpec[][] => texts.map((text) => [text]);
/** Excel's serial of 5 January 2026. */
const DAY = 46027;

describe('what is asked about times', () => {
  it('asks whether day or month comes first, with both days spelled out', async () => {
    const stamps = one('03/02/2025 06:00', '04/02/2025 06:00');
    const { question, at } = await times(['Time'], stamps);
    expect(at).toEqual([]);
    expect(question).toMatchObject({ code: 'date-order', sheet: 'S', column: 'A', rows: 2 });
    expect(question.choices.map(({ label }) => label)).toEqual(['3 February 2025', '2 March 2025']);
    const dayFirst = await times(['Time'], stamps, question.choices[0].answers);
    expect([dayFirst.codes, dayFirst.at]).toEqual([[], ['2025-02-03T05:00', '2025-02-04T05:00']]);
  });
  it('goes by a day beyond the twelfth, though it comes later', async () => {
    const { codes, at } = await times(['Time'], one('03/02/2026 06:00', '13/02/2026 06:00'));
    expect([codes, at]).toEqual([[], ['2026-02-03T05:00', '2026-02-13T05:00']]);
  });
  it('goes by the only order in which the dates have come', async () => {
    // On 1 March 2026 the fifth of January has come and the first of May has not.
    const { codes, at } = await times(['Time'], one('05/01/2026 06:00'));
    expect([codes, at]).toEqual([[], ['2026-01-05T05:00']]);
  });

  it('asks for the day of times without a date, and follows them over midnight from there', async () => {
    const stamps = one('22:10', '23:50', '00:05', '23:58', '05:40');
    const { question, at } = await times(['Time'], stamps);
    expect(at).toEqual([]);
    expect(question).toMatchObject({ code: 'date-missing', rows: 5 });
    const said = await times(['Time'], stamps, { date: '2026-01-05' });
    expect(said.codes).toEqual([]);
    expect(said.at).toEqual([
      '2026-01-05T21:10',
      '2026-01-05T22:50',
      '2026-01-05T23:05',
      '2026-01-05T22:58',
      '2026-01-06T04:40',
    ]);
  });
  it('takes the day from the sheet’s name, and says so', async () => {
    const { result, at } = await times(['Time'], one('22:10', '00:05'), {}, '2026-01-05');
    expect(at).toEqual(['2026-01-05T21:10', '2026-01-05T23:05']);
    expect(problemList(result)).toEqual(['notice date-from-sheet A']);
  });
  it('leaves out a time without a date among times with one', async () => {
    const { codes, result } = await times(['Time'], one('2026-01-05 06:00', '06:10'));
    expect(codes).toEqual([]);
    expect(problemList(result)).toEqual(['row_not_used date-missing A3']);
  });

  it('asks whether dates are those on which shifts began, and takes either answer', async () => {
    const clocks = ['22:00', '23:55', '00:10', '05:50'];
    const stamps = clocks.map((clock): CellSpec[] => [{ day: DAY }, clock]);
    const { question } = await times(['Date', 'Time'], stamps);
    expect(question).toMatchObject({ code: 'shift-date', rows: 2 });
    expect(question.choices.map(({ label }) => label)).toEqual([
      'Yes: 00:10 on 6 January 2026',
      'No: 00:10 on 5 January 2026, as written',
    ]);
    const [yes, no] = question.choices;
    const shift = await times(['Date', 'Time'], stamps, yes.answers);
    expect(shift.at).toEqual(['2026-01-05T21:00', '2026-01-05T22:55', '2026-01-05T23:10', '2026-01-06T04:50']);
    const written = await times(['Date', 'Time'], stamps, no.answers);
    expect([written.codes, written.at[2]]).toEqual([[], '2026-01-04T23:10']);
  });
  it('does not ask where the date changes at midnight', async () => {
    const stamps: CellSpec[][] = [
      [{ day: DAY }, '22:00'],
      [{ day: DAY + 1 }, '00:10'],
      [{ day: DAY + 1 }, '05:50'],
      [{ day: DAY + 1 }, '22:00'],
    ];
    expect((await times(['Date', 'Time'], stamps)).codes).toEqual([]);
  });

  it('asks which pass of the repeated hour it was where no row tells', async () => {
    const stamps = one('2025-10-26 02:15', '2025-10-26 02:25');
    const { question } = await times(['Time'], stamps);
    expect(question).toMatchObject({ code: 'repeated-hour', rows: 2 });
    const [first, second] = question.choices;
    expect((await times(['Time'], stamps, first.answers)).at).toEqual(['2025-10-26T00:15', '2025-10-26T00:25']);
    expect((await times(['Time'], stamps, second.answers)).at).toEqual(['2025-10-26T01:15', '2025-10-26T01:25']);
  });
  it('reads times in the zone that was answered', async () => {
    const { at } = await times(['Time'], one('2026-01-05 06:00'), { sheets: { S: { timeZone: 'America/New_York' } } });
    expect(at).toEqual(['2026-01-05T11:00']);
  });
  it('asks about a sheet of which no time has come yet', async () => {
    const { question } = await times(['Time'], one('2027-01-05 06:00', '2027-01-05 06:10', '2027-01-05 06:20'));
    expect(question).toMatchObject({ code: 'ahead-of-now', rows: 3 });
  });
});

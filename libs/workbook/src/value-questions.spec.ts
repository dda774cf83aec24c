import type { WorkbookAnswers } from './answers';
import { COATER, read } from './testing/coater';
import { makeWorkbook, type CellSpec } from './testing/make-workbook';
import type { LineContext } from './types';

/** A thickness of 16 ± 1 µm and a coat weight of 12 ± 0.5 g/m², for one product. */
const CONTEXT: LineContext = {
  ...COATER,
  channels: COATER.channels.map((channel) => ({
    ...channel,
    specifications:
      channel.id === 12
        ? [{ product: 'SEP-12', nominal: 16, lower: 15, upper: 17 }]
        : channel.id === 11
          ? [{ product: 'SEP-12', nominal: 12, lower: 11.5, upper: 12.5 }]
          : [],
  })),
};
const STAMP = { date: 46027.25 };

/** Reads a column of values under a header, in the wide layout. */
async function column(header: string, values: CellSpec[], answers: WorkbookAnswers = {}, product = 'SEP-12') {
  const rows = [['Time', 'Lot', 'Product', header], ...values.map((value) => [STAMP, 'A', product, value])];
  const { report, readings } = await read(makeWorkbook({ sheets: [{ name: 'S', rows }] }), CONTEXT, { answers });
  const [question] = report.questions;
  return {
    report,
    question,
    codes: report.questions.map(({ code }) => code),
    values: readings.map(({ value }) => value),
  };
}

describe('what is asked about values', () => {
  it('asks of a decimal sign that no cell tells, and reads by the answer', async () => {
    const texts = ['12,125', '12,250', '12,375'];
    const { question, values } = await column('Coat weight', texts);
    expect(values).toEqual([]);
    expect(question).toMatchObject({ code: 'decimal-sign', sheet: 'S', column: 'D', rows: 3 });
    expect(question.detail).toBe(
      'Sheet "S", cell D2 holds "12,125" (and 2 more), which is 12.125 or 12125. Which is it?',
    );
    expect(question.choices.map(({ label }) => label)).toEqual(['"12,125" is 12.125', '"12,125" is 12125']);
    const comma = await column('Coat weight', texts, question.choices[0].answers);
    expect([comma.codes, comma.values]).toEqual([[], [12.125, 12.25, 12.375]]);
    const group = await column('Coat weight', texts, question.choices[1].answers);
    expect(group.values).toEqual([12125, 12250, 12375]);
  });
  it('goes by the cells of the column that tell, though they come later', async () => {
    const { codes, values } = await column('Coat weight', ['12,125', '12,2', '12,375']);
    expect([codes, values]).toEqual([[], [12.125, 12.2, 12.375]]);
  });

  it('asks of 9999 and of 0 far from all other values, and takes either answer', async () => {
    for (const code of [9999, -999, 0]) {
      const cells = [12.1, 12.2, code, 11.9, 12];
      const { question, values } = await column('Coat weight', cells);
      expect(values).toEqual(cells);
      expect(question).toMatchObject({ code: 'code-or-value', column: 'D', rows: 1 });
      const [missing, measured] = question.choices;
      expect((await column('Coat weight', cells, missing.answers)).values).toEqual([12.1, 12.2, 11.9, 12]);
      const kept = await column('Coat weight', cells, measured.answers);
      expect([kept.codes, kept.values]).toEqual([[], cells]);
    }
  });
  it('does not ask of such numbers among values like them', async () => {
    expect((await column('Oven exit temperature', [998, 999, 1001, 1003])).codes).toEqual([]);
    expect((await column('Oven exit temperature', [-1, 0, 2, 1])).codes).toEqual([]);
    expect((await column('Oven exit temperature', [0, 0, 0])).codes).toEqual([]);
  });

  it('asks of a column that fits only in another unit', async () => {
    const cells = [0.0161, 0.0158, 0.0164];
    const { question, values } = await column('Web thickness', cells);
    expect(values).toEqual(cells);
    expect(question).toMatchObject({ code: 'unit-suspect', column: 'D', rows: 3 });
    const inMillimetres = question.choices.find(({ label }) => label.startsWith('Values in mm'));
    expect(inMillimetres?.label).toBe('Values in mm: 0.0161 is 16.1 µm');
    const converted = await column('Web thickness', cells, inMillimetres!.answers);
    expect([converted.codes, converted.values]).toEqual([[], [16.1, 15.8, 16.4]]);
    const asTheyStand = await column('Web thickness', cells, question.choices.at(-1)!.answers);
    expect([asTheyStand.codes, asTheyStand.values]).toEqual([[], cells]);
  });
  it('asks of a column that fits only as deviations from nominal', async () => {
    const cells = [0.1, -0.2, 0.3, -0.05];
    const { question } = await column('Web thickness', cells);
    expect(question.code).toBe('deviation-suspect');
    expect(question.choices[0].label).toBe('Deviations from nominal in µm: 0.1 is 16.1 µm');
    const summed = await column('Web thickness', cells, question.choices[0].answers);
    expect([summed.codes, summed.values]).toEqual([[], [16.1, 15.8, 16.3, 15.95]]);
    const asTheyStand = await column('Web thickness', cells, question.choices.at(-1)!.answers);
    expect([asTheyStand.codes, asTheyStand.values]).toEqual([[], cells]);
  });
  it('does not use deviations of a product without a nominal value, and says so', async () => {
    const answers: WorkbookAnswers = {
      sheets: { S: { columns: { D: { role: 'channel_values', channelId: 12, isDeviation: true } } } },
    };
    const { report, values } = await column('Web thickness', [0.1], answers, 'SEP-16');
    expect(values).toEqual([]);
    expect(report.problems.map(({ code, severity }) => `${severity} ${code}`)).toContain(
      'row_not_used nominal-missing',
    );
  });
  it('does not ask where values fit, nor where they fit in no other way', async () => {
    expect((await column('Web thickness', [15.5, 16, 16.5])).codes).toEqual([]);
    expect((await column('Web thickness', [18.5, 19, 18])).codes).toEqual([]);
    expect((await column('Web thickness', [300, 310, 305])).codes).toEqual([]);
  });

  it('asks for the unit where the stated one is not known', async () => {
    const { question, report } = await column('Web thickness [scale marks]', [16.1]);
    expect(question).toMatchObject({ code: 'unit-unknown', column: 'D' });
    expect(report.isBlocked).toBe(true);
    const answered = await column('Web thickness [scale marks]', [16.1], question.choices[0].answers);
    expect([answered.codes, answered.values]).toEqual([[], [16.1]]);
  });
  it('converts a unit of the cell’s own, and percentages', async () => {
    expect((await column('Web thickness', ['0.016 mm', 16.5, '0.6 mil'])).values).toEqual([16, 16.5, 15.24]);
    expect((await column('Web thickness', [{ percent: 0.16 }])).values).toEqual([]);
  });
});

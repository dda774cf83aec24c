import { csvOf, fit } from '../testing/run-in-process';

const rows = Array.from({ length: 60 }, (_, i) => i);
const level = (i: number) => 5 + 0.02 * i + 0.2 * (((13 * i) % 17) / 17 - 0.5);
const t = rows.map((i) => 60 * i);
const lot = rows.map((i) => `L${Math.floor(i / 3)}`);
const isBad = (i: number) => lot[i] === 'L8';
const y = rows.map((i) => level(i) + (isBad(i) ? 40 : 0));

describe('--robust', () => {
  it.each([[['--edf', '4']], [[]], [['--method', 'natural-spline', '--knots', '3']], [['--method', 'constant']]])(
    'sets down a bad lot, names it, and scores it as one that does not pull (%j)',
    async (options) => {
      const answer = await fit([...options, '--robust'], csvOf({ t, y, lot }));
      expect(answer.lots[8]).toMatchObject({ lot: 'L8', weight: 0 });
      for (const one of answer.lots) expect(one.weight! >= 0 && one.weight! <= 1).toBe(true);
      expect(answer.warnings.join()).toContain('--robust set down lot L8: they do not pull');
      for (const i of rows.filter(isBad)) {
        expect(answer.leverage[i]).toBe(0);
        expect(answer.deletedResidual[i]).toBeCloseTo(y[i] - answer.fitted[i]!, 10);
      }
    },
  );

  it('gives nearly the curve that there is without the bad lot', async () => {
    const robust = await fit(['--lambda', '1e9', '--robust'], csvOf({ t, y, lot }));
    const clean = await fit(['--lambda', '1e9'], csvOf({ t, y, lot, w: rows.map((i) => (isBad(i) ? 0 : 1)) }));
    const plain = await fit(['--lambda', '1e9'], csvOf({ t, y, lot }));
    const miss = (fitted: (number | null)[]) => Math.max(...rows.map((i) => Math.abs(fitted[i]! - clean.fitted[i]!)));
    expect(miss(robust.fitted)).toBeLessThan(0.02);
    expect(miss(plain.fitted)).toBeGreaterThan(1);
  });

  it('names rows where there is no column lot, as the file numbers them', async () => {
    const answer = await fit(
      ['--edf', '4', '--robust'],
      csvOf({ t, y: rows.map((i) => level(i) + (i === 20 ? 40 : 0)) }),
    );
    expect(answer.warnings.join()).toContain('--robust set down row 22:');
    expect(answer.lots).toEqual([]);
  });
});

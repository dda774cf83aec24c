import { csvOf, fit, run } from '../testing/run-in-process';
import { largestMiss, rangeOf } from '../testing/reference-file';

/** A slow wave with scatter from a formula, every 600 s; lots of four rows. */
const rows = Array.from({ length: 48 }, (_, i) => i);
const wave = {
  t: rows.map((i) => 600 * i),
  y: rows.map((i) => 10 + Math.sin(i / 8) + 0.3 * (((13 * i) % 17) / 17 - 0.5)),
  lot: rows.map((i) => `L${i >> 2}`),
};
const shuffle = <T>(values: T[]): T[] => rows.map((i) => values[(29 * i) % 48]);
const METHODS = [
  ['--lambda', '1e12'],
  ['--method', 'natural-spline', '--knots', '5'],
  ['--method', 'b-spline', '--knots', '3'],
  ['--method', 'polynomial', '--degree', '4'],
  ['--method', 'constant'],
];

describe('the answer to a fit', () => {
  it('has its keys in order', async () => {
    const answer = await fit(['--edf', '6', '--robust', '--project', '30000'], csvOf(wave));
    expect(Object.keys(answer)).toEqual(
      'method smoothness sigma2 criterion t fitted standardError leverage deletedResidual lots projection warnings'.split(
        ' ',
      ),
    );
    expect(Object.keys(answer.smoothness)).toEqual(['rule', 'value', 'lambda', 'edf', 'atFloor']);
    expect(Object.keys(answer.lots[0])).toEqual(['lot', 'residual', 'variance', 'score', 'weight']);
    expect(Object.keys(answer.projection[0])).toEqual(['t', 'value', 'standardError']);
    expect(answer.criterion).toEqual({ name: null, value: null, curve: [] });
  });

  it.each(METHODS)(
    'leaves each row out by itself where there is no column lot: e = (y - g) / (1 - h) (%s %s)',
    async (...options) => {
      const { t, y } = wave;
      const answer = await fit(options, csvOf({ t, y }));
      expect(answer.lots).toEqual([]);
      const wanted = y.map((value, i) => (value - answer.fitted[i]!) / (1 - answer.leverage[i]!));
      expect(largestMiss(answer.deletedResidual, wanted, rangeOf(y))).toBeLessThan(1e-11);
      expect(answer.leverage.reduce<number>((sum, h) => sum + h!, 0)).toBeCloseTo(answer.smoothness.edf, 9);
    },
  );

  it.each(METHODS)('follows the order of the rows and depends on nothing else of it (%s %s)', async (...options) => {
    const straight = await fit(options, csvOf(wave));
    const mixed = await fit(options, csvOf({ lot: shuffle(wave.lot), y: shuffle(wave.y), t: shuffle(wave.t) }));
    for (const key of ['t', 'fitted', 'standardError', 'leverage', 'deletedResidual'] as const)
      expect(
        largestMiss(mixed[key], shuffle(straight[key]) as number[], rangeOf(straight[key] as number[]) || 1),
      ).toBeLessThan(1e-12);
    expect(mixed.lots.map(({ lot }) => lot)).toEqual(straight.lots.map(({ lot }) => lot));
  });

  it('takes nothing from a row of weight 0 and answers for it', async () => {
    const { t, y } = wave;
    const w = rows.map((i) => (i % 5 === 2 ? 0 : 1));
    const y0 = y.map((value, i) => (w[i] === 0 ? value + 100 : value));
    const others = rows.filter((i) => w[i] > 0);
    const idle = rows.filter((i) => w[i] === 0);
    const all = await fit(['--lambda', '1e12'], csvOf({ t, y: y0, w }));
    const few = await fit(
      ['--lambda', '1e12', '--project', idle.map((i) => t[i]).join(',')],
      csvOf({ t: others.map((i) => t[i]), y: others.map((i) => y[i]) }),
    );
    const pick = (values: (number | null)[], at: number[]) => at.map((i) => values[i]);
    expect(largestMiss(pick(all.fitted, others), few.fitted as number[], 1)).toBeLessThan(1e-12);
    expect(
      largestMiss(
        pick(all.fitted, idle),
        few.projection.map((p) => p.value),
        1,
      ),
    ).toBeLessThan(1e-12);
    expect(
      largestMiss(
        pick(all.standardError, idle),
        few.projection.map((p) => p.standardError!),
        1,
      ),
    ).toBeLessThan(1e-12);
    expect(pick(all.leverage, idle)).toEqual(idle.map(() => 0));
    idle.forEach((i) => expect(all.deletedResidual[i]).toBeCloseTo(y0[i] - all.fitted[i]!, 12));
    expect(all.sigma2).toBeCloseTo(few.sigma2!, 12);
    expect(all.smoothness.edf).toBeCloseTo(few.smoothness.edf, 10);
  });

  it('keeps lambda and w as they are given: four times both is the same curve with four times the variance', async () => {
    const { t, y } = wave;
    const one = await fit(['--lambda', '1e12'], csvOf({ t, y }));
    const four = await fit(['--lambda', '4e12'], csvOf({ t, y, w: rows.map(() => 4) }));
    expect(largestMiss(four.fitted, one.fitted as number[], 1)).toBeLessThan(1e-13);
    expect(largestMiss(four.standardError, one.standardError as number[], 1)).toBeLessThan(1e-13);
    expect(four.sigma2! / one.sigma2!).toBeCloseTo(4, 10);
  });

  it('takes ISO times as epoch seconds, and says which have no zone', async () => {
    const at = (i: number) => new Date((1772344800 + 600 * i) * 1000).toISOString();
    const iso = await fit(['--edf', '5', '--project', at(60)], csvOf({ ...wave, t: rows.map(at) }));
    const plain = await fit(
      ['--edf', '5', '--project', String(1772344800 + 36_000)],
      csvOf({ ...wave, t: rows.map((i) => 1772344800 + 600 * i) }),
    );
    expect(iso).toEqual(plain);
    const zoneless = await fit(
      ['--edf', '5'],
      csvOf({ ...wave, t: rows.map((i) => at(i).slice(0, i === 3 ? 19 : 24)) }),
    );
    expect(zoneless.fitted).toEqual(plain.fitted);
    expect(zoneless.warnings).toContain('1 time has no zone: read as UTC');
  });

  it('says null and why for a lot without which nothing is determined', async () => {
    const lot = rows.map((i) => (i === 47 ? 'B' : 'A'));
    const answer = await fit(['--lambda', '1e12'], csvOf({ ...wave, lot }));
    expect(answer.lots[0]).toEqual({ lot: 'A', residual: null, variance: null, score: null });
    expect(answer.deletedResidual.slice(0, 47)).toEqual(rows.slice(0, 47).map(() => null));
    expect(Number.isFinite(answer.deletedResidual[47])).toBe(true);
    expect(Number.isFinite(answer.lots[1].score)).toBe(true);
    expect(answer.warnings.join()).toContain('Without lot A the others determine no baseline');
  });

  it('says null and why where the baseline passes through every row', async () => {
    const answer = await fit(['--method', 'polynomial', '--degree', '4'], 't,y\n0,1\n1,2\n2,0\n3,5\n4,1\n');
    expect(answer.sigma2).toBeNull();
    expect(answer.standardError).toEqual([null, null, null, null, null]);
    expect(answer.warnings.join()).toContain('passes through every row');
  });

  it('gives no scores where the residuals are only rounding', async () => {
    const answer = await fit(['--edf', '3'], csvOf({ ...wave, y: rows.map((i) => 0.1 + 0.3 * i) }));
    for (const { score } of answer.lots) expect(score).toBeNull();
    expect(answer.sigma2).toBeLessThan(1e-25);
    expect(answer.warnings).toEqual(['The rows lie on the baseline but for rounding: scores are null']);
  });

  it('warns of a shortest period that is short against the spacing of the lots', async () => {
    const warnings = async (period: number) =>
      (await fit(['--edf', '3', '--shortest-period', `${period}`], csvOf(wave))).warnings;
    expect(await warnings(2400 * 11)).toEqual([
      '--shortest-period 26400 is 11 times the median spacing of lots: below 22 a baseline follows single lots',
    ]);
  });

  it('warns of few lots for many degrees of freedom', async () => {
    const answer = await fit(['--edf', '6'], csvOf(wave));
    expect(answer.warnings.join()).toContain('12 lots are few for 6 effective degrees of freedom');
    expect((await fit(['--edf', '3.9'], csvOf(wave))).warnings).toEqual([]);
  });
});

describe('an input that cannot be computed', () => {
  it.each([
    ['t,y\n1,2\n2,3\n3,x\n', [], "row 4: y is not a number: 'x'"],
    ['t,y\n', [], 'there are no rows below the header'],
    ['t,y\n1,2\n2,3\n', ['--lambda', '1'], 'insufficient-data: too few rows, times or lots for what is asked'],
    ['t,y,w\n1,2,0\n2,3,0\n', ['--lambda', '1'], 'every row has weight 0'],
    ['t,y\n1,2\n2,3\n3,5\n4,4\n', ['--edf', '4.5'], '--edf 4.5'],
    ['t,y\n1,2\n2,3\n3,5\n4,4\n', ['--edf', '1.5'], '--edf 1.5'],
    [
      't,y\n1,2\n2,3\n3,5\n4,4\n',
      ['--method', 'natural-spline', '--knots', '3'],
      '--knots 3 gives --method natural-spline 5 degrees of freedom',
    ],
    [
      't,y\n1,2\n2,3\n3,5\n4,4\n',
      ['--lambda', '1', '--project', '2026-03-01T06:00:00Z'],
      "--project '2026-03-01T06:00:00Z' is not of the kind that column t has",
    ],
    [
      't,y\n1,2\n2,3\n3,5\n4,4\n',
      ['--lambda', '1', '--project', 'later'],
      "--project is neither a number nor an ISO time that exists: 'later'",
    ],
  ])('%j with %j is one line on stderr, nothing on stdout, and status 2', async (csv, options, message) => {
    const { code, stdout, stderr } = await run(['fit', ...options], csv);
    expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
    expect(stderr).toContain(message);
    expect(stderr).toMatch(/^compute: [^\n]+\n$/);
  });
});

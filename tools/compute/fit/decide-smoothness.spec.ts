import { csvOf, fit, run } from '../testing/run-in-process';
import { referenceFile } from '../testing/reference-file';

const { series } = referenceFile<{ series: Record<string, { x: number[]; y: number[] }> }>('r-smooth-spline.json');
const nile = csvOf({ t: series.Nile.x, y: series.Nile.y, lot: series.Nile.x.map((_, i) => `L${Math.floor(i / 5)}`) });
/** 100 readings a year apart: the window is 99, kappa is 1 a year. */
const floorOf = (period: number) => (period / (2 * Math.PI)) ** 4;
const refusal = async (...options: string[]) => (await run(['fit', ...options], nile)).stderr;

describe('the shortest period', () => {
  it('raises a lambda below kappa (T / 2 pi)^4 to it and says so', async () => {
    const { smoothness, warnings } = await fit(['--lambda', '1', '--shortest-period', '22'], nile);
    expect(smoothness).toMatchObject({ rule: 'lambda', atFloor: true });
    expect(smoothness.lambda! / floorOf(22)).toBeCloseTo(1, 12);
    expect(warnings.join()).toContain('--lambda 1 is below the floor of --shortest-period 22');
    expect((await fit(['--lambda', '1000', '--shortest-period', '22'], nile)).smoothness).toMatchObject({
      lambda: 1000,
      atFloor: false,
    });
  });

  it('does not count rows of weight 0 in kappa', async () => {
    const t = Array.from({ length: 199 }, (_, i) => i / 2);
    const csv = csvOf({ t, y: t.map((at) => Math.sin(at / 3)), w: t.map((_, i) => (i % 2 === 0 ? 1 : 0)) });
    expect((await fit(['--lambda', '1', '--shortest-period', '22'], csv)).smoothness.lambda! / floorOf(22)).toBeCloseTo(
      1,
      12,
    );
    expect(
      (await fit(['--choose', 'gcv', '--shortest-period', '22'], csv)).smoothness.lambda! / floorOf(22),
    ).toBeCloseTo(1, 12);
  });

  it('is refused where rows are so sparse that kappa is 0', async () => {
    const { code, stderr } = await run(
      ['fit', '--lambda', '1', '--shortest-period', '2'],
      't,y\n0,1\n1,2\n2,1\n1000,3\n',
    );
    expect({ code, stderr }).toEqual({
      code: 2,
      stderr: 'compute: --shortest-period 2: the 90 % quantile of the density of weight, kappa, is 0\n',
    });
  });

  it('decides where a criterion or degrees of freedom would follow faster movements', async () => {
    const gcv = await fit(['--choose', 'gcv', '--shortest-period', '16'], nile);
    expect(gcv.smoothness.atFloor).toBe(true);
    expect(gcv.smoothness.lambda! / floorOf(16)).toBeCloseTo(1, 12);
    expect(gcv.warnings.join()).toContain('The floor of --shortest-period 16 decided');
    const edf = await fit(['--edf', '20', '--shortest-period', '22'], nile);
    expect(edf.smoothness).toMatchObject({ rule: 'edf', value: 20, atFloor: true });
    expect(edf.smoothness.lambda! / floorOf(22)).toBeCloseTo(1, 12);
  });

  it.each([
    [['--lambda', '1']],
    [['--choose', 'reml']],
    [['--edf', '9']],
    [['--method', 'natural-spline']],
    [['--method', 'b-spline']],
  ])('longer than the record leaves the straight line (%j)', async (options) => {
    const answer = await fit([...options, '--shortest-period', '100'], nile);
    expect(answer.smoothness.edf).toBeCloseTo(2, 12);
    expect(answer.smoothness).toMatchObject({ lambda: null, atFloor: true });
    expect(answer.warnings.join()).toContain(
      '--shortest-period is longer than the record: the baseline is the straight line',
    );
  });

  it('bounds knots and degrees, naming both options', async () => {
    expect(await refusal('--method', 'natural-spline', '--knots', '9', '--shortest-period', '22')).toBe(
      'compute: --knots 9 is faster than --shortest-period 22: at most 8 over this record\n',
    );
    expect(await refusal('--method', 'b-spline', '--knots', '0', '--shortest-period', '100')).toContain(
      '--shortest-period 100, which is longer than the record',
    );
    expect(await refusal('--method', 'polynomial', '--degree', '4', '--shortest-period', '60')).toBe(
      'compute: --degree 4 is faster than --shortest-period 60: at most 3 over this record\n',
    );
  });

  it('moves knots apart that stand nearer than half of it', async () => {
    const uneven = csvOf({
      t: series.Nile.x.filter((x) => x < 1890 || x > 1960),
      y: series.Nile.y.filter((_, i) => i < 19 || i > 89),
    });
    const options = ['--method', 'natural-spline', '--knots', '5'];
    const free = await fit(options, uneven);
    const moved = await fit([...options, '--shortest-period', '22'], uneven);
    expect(moved.smoothness).toMatchObject({ rule: 'knots', value: 5, atFloor: false });
    expect(moved.fitted).not.toEqual(free.fitted);
    // Quantiles of 30 years lie 5 apart, less than 11: one knot of each crowd moves into the empty middle.
    expect((await fit([...options, '--shortest-period', '2'], uneven)).fitted).toEqual(free.fitted);
  });

  it('bounds how far the baseline is projected, naming both options', async () => {
    const answer = await fit(['--lambda', '300', '--shortest-period', '22', '--project', '1992,1849'], nile);
    expect(answer.projection.map(({ t }) => t)).toEqual([1992, 1849]);
    expect(await refusal('--lambda', '300', '--shortest-period', '22', '--project', '1993')).toBe(
      'compute: --project 1993 lies further from the record than --shortest-period 22\n',
    );
  });
});

describe('what is answered of the smoothness', () => {
  it('is the penalty, the number of knots or the degree that was given', async () => {
    expect((await fit(['--lambda', '300'], nile)).smoothness).toMatchObject({
      rule: 'lambda',
      value: 300,
      lambda: 300,
    });
    expect((await fit(['--method', 'b-spline', '--knots', '4'], nile)).smoothness).toMatchObject({
      rule: 'knots',
      value: 4,
      lambda: null,
    });
    expect((await fit(['--method', 'polynomial', '--degree', '2'], nile)).smoothness).toMatchObject({
      rule: 'degree',
      value: 2,
      lambda: null,
    });
    expect((await fit(['--method', 'constant'], nile)).smoothness).toMatchObject({
      rule: 'none',
      value: null,
      lambda: null,
    });
  });

  it('is null for the infinite lambda of the straight line', async () => {
    const { smoothness, warnings } = await fit(['--lambda', 'inf'], nile);
    expect(smoothness).toEqual({ rule: 'lambda', value: null, lambda: null, edf: 2, atFloor: false });
    expect(warnings.join()).toContain('straight line');
  });

  it.each([
    [['--choose', 'gcv'], 'gcv', 'lambda'],
    [[], 'lot-cv', 'lambda'],
    [['--method', 'natural-spline', '--choose', 'gcv14'], 'gcv14', 'knots'],
    [['--method', 'polynomial'], 'lot-cv', 'degree'],
  ])('has the whole curve of the criterion, with the choice at its smallest (%j)', async (options, name, size) => {
    const { criterion, smoothness } = await fit(options, nile);
    expect(criterion.name).toBe(name);
    expect(smoothness.rule).toBe(name);
    expect(criterion.curve.length).toBeGreaterThan(3);
    for (const point of criterion.curve) expect(Object.keys(point)).toEqual([size, 'edf', 'value']);
    const smallest = Math.min(...criterion.curve.map(({ value }) => value!));
    expect(criterion.value).toBeLessThanOrEqual(smallest);
  });

  it('says where a criterion has several minima', async () => {
    expect((await fit([], nile)).warnings.join()).toMatch(
      /lot-cv has 2 minima, from the smallest on at lambda 8\d{4} \(edf 3\.\d+\), lambda 0\.6/,
    );
  });

  it('is smoother by the one-standard-error rule', async () => {
    const best = await fit([], nile);
    const smoother = await fit(['--one-standard-error'], nile);
    expect(smoother.smoothness.lambda!).toBeGreaterThan(best.smoothness.lambda!);
    expect(smoother.warnings.join()).toContain('the smoothest within that was taken');
  });
});

describe('a projection', () => {
  it('beyond the record is refused for what runs away there, naming both options, and allowed inside', async () => {
    for (const method of ['polynomial', 'b-spline']) {
      expect((await fit(['--method', method, '--project', '1900.5'], nile)).projection).toHaveLength(1);
      const stderr = await refusal('--method', method, '--project', '1900.5,1971');
      expect(stderr).toContain('--project 1971 lies beyond the record');
      expect(stderr).toContain(`--method ${method}`);
    }
  });

  it('of natural ends is a straight line with a band that grows', async () => {
    const { projection } = await fit(['--lambda', '300', '--project', '1970,1975,1980,1985'], nile);
    const [a, b, c, d] = projection.map(({ value }) => value);
    expect(b - a).toBeCloseTo(c - b, 8);
    expect(d - c).toBeCloseTo(c - b, 8);
    const errors = projection.map(({ standardError }) => standardError!);
    expect([...errors].sort((x, y) => x - y)).toEqual(errors);
  });
});

import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { csvOf, type PlainAnswer } from './testing/run-in-process';
import { largestMiss, rangeOf, referenceFile } from './testing/reference-file';

const ROOT = join(__dirname, '..', '..');
interface Run {
  code: number | null;
  stdout: string;
  stderr: string;
}

/** `npm run -s compute -- …`, as anybody would run it. `readUpTo` characters of its output, then stops listening. */
function compute(args: string[], csv = '', readUpTo = Infinity): Promise<Run> {
  return new Promise((resolve, reject) => {
    const child = spawn('npm', ['run', '-s', 'compute', '--', ...args], { cwd: ROOT });
    const run: Run = { code: null, stdout: '', stderr: '' };
    child.stdout.on('data', (piece: Buffer) => {
      run.stdout += piece.toString();
      if (run.stdout.length >= readUpTo) child.stdout.destroy();
    });
    child.stderr.on('data', (piece: Buffer) => (run.stderr += piece.toString()));
    child.on('error', reject);
    child.on('close', (code) => resolve({ ...run, code }));
    child.stdin.on('error', () => {});
    child.stdin.end(csv);
  });
}
const fit = async (args: string[], csv: string): Promise<PlainAnswer> => {
  const { code, stdout, stderr } = await compute(['fit', ...args], csv);
  expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
  return JSON.parse(stdout) as PlainAnswer;
};

interface Fit {
  lambda: number;
  df: number;
  fitted: number[];
  leverage: number[];
}
type Series = Record<
  string,
  {
    x: number[];
    y: number[];
    w: number[];
    fits: Fit[];
    choices: { cv: boolean; lambda: number; df: number; crit: number }[];
  }
>;
const { series } = referenceFile<{ series: Series }>('r-smooth-spline.json');
const valueAt = (x: number[], values: number[]) => {
  const distinct = [...new Set(x)].sort((a, b) => a - b);
  return x.map((at) => values[distinct.indexOf(at)]);
};

describe('npm run -s compute', () => {
  // R's Gram matrix has .3330 for 1/3, which moves its fit by up to 1e-4 of the range and its leverages by 3e-4.
  it("gives R's smooth.spline for cars at a given lambda, ties and all, whatever the order of rows and columns", async () => {
    const { x, y, fits } = series.cars;
    for (const { lambda, df, fitted, leverage } of fits.slice(1, 3)) {
      const raw = lambda * rangeOf(x) ** 3;
      const back = <T>(values: T[]): T[] => [...values].reverse();
      const answer = await fit([`--lambda=${raw}`], csvOf({ y: back(y), t: back(x) }));
      expect(answer.t).toEqual(back(x));
      expect(largestMiss(answer.fitted, back(valueAt(x, fitted)), rangeOf(y))).toBeLessThan(1e-4);
      const repeats = x.map((at) => x.filter((other) => other === at).length);
      const shared = valueAt(x, leverage).map((h, i) => h / repeats[i]);
      expect(largestMiss(answer.leverage, back(shared), 1)).toBeLessThan(3e-4);
      expect(answer.smoothness.edf / df).toBeCloseTo(1, 3);
    }
  });

  // A criterion is flat at its smallest: its value is compared, and degrees of freedom loosely.
  it("chooses as R's smooth.spline does by gcv and by leaving out, for the lake's level", async () => {
    const { x, y, choices } = series.LakeHuron;
    for (const { cv, df, crit } of choices) {
      const answer = await fit(['--choose', cv ? 'lot-cv' : 'gcv'], csvOf({ t: x, y }));
      expect(answer.criterion.value! / crit).toBeCloseTo(1, 3);
      expect(answer.smoothness.edf / df).toBeCloseTo(1, 1);
    }
  });

  it("gives mgcv's REML: degrees of freedom, variance, curve and standard errors", async () => {
    interface Reml {
      x: number[];
      y: number[];
      edf: number;
      scale: number;
      fitted: number[];
      standardError: number[];
    }
    const { x, y, edf, scale, fitted, standardError } = referenceFile<{ series: Record<string, Reml> }>(
      'mgcv-smoothing-spline.json',
    ).series.Nile;
    const answer = await fit(['--choose', 'reml'], csvOf({ t: x, y }));
    expect(answer.smoothness.edf / edf).toBeCloseTo(1, 3);
    expect(answer.sigma2! / scale).toBeCloseTo(1, 3);
    expect(largestMiss(answer.fitted, fitted, rangeOf(y))).toBeLessThan(1e-3);
    expect(largestMiss(answer.standardError, standardError, Math.max(...standardError))).toBeLessThan(2e-3);
  });

  it('answers bad input with status 2 and one line that names the row, and nothing else', async () => {
    const run = await compute(['fit'], 't,y\n1,2\n2,3\n3,many\n');
    expect(run).toEqual({ code: 2, stdout: '', stderr: "compute: row 4: y is not a number: 'many'\n" });
  });

  it('answers contradictions and unknown commands with status 2', async () => {
    const both = await compute(['fit', '--edf', '3', '--lambda=2'], 't,y\n1,2\n');
    expect(both).toMatchObject({ code: 2, stdout: '' });
    expect(both.stderr).toMatch(/^compute: --lambda and --edf contradict[^\n]*\n$/);
    expect(await compute(['judge'])).toMatchObject({ code: 2, stdout: '' });
  });

  it('helps, and its example runs', async () => {
    const help = await compute(['--help']);
    expect(help).toMatchObject({ code: 0, stderr: '' });
    const example = /printf '([^']+)' \| npm run -s compute -- (.+)/.exec(help.stdout)!;
    const answer = await compute(example[2].split(' '), example[1].replaceAll('\\n', '\n'));
    expect(answer).toMatchObject({ code: 0, stderr: '' });
    expect((JSON.parse(answer.stdout) as PlainAnswer).fitted).toHaveLength(5);
  });

  it('does not mind a reader who has seen enough', async () => {
    const t = Array.from({ length: 20_000 }, (_, i) => i);
    const run = await compute(['fit', '--edf', '5'], csvOf({ t, y: t.map((i) => Math.sin(i / 3000)) }), 1000);
    expect(run).toMatchObject({ code: 0, stderr: '' });
  });
});

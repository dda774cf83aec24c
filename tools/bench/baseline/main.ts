import { cpus } from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { measureEvaluators } from './evaluators';
import { measureLots } from './lot-figures';
import { allocationLines, lotLines, sizeTables, targetLines } from './report';
import { measureSize, type SizeFigures } from './size-figures';
import { judgeTargets } from './targets';
import { findYardsticks, SLOW_LIMIT } from './yardsticks';

const NOTE =
  `R all.knots and SciPy, asked up to ${SLOW_LIMIT.toLocaleString('en')} points, solve the textbook banded system, which loses its digits for slow ` +
  'baselines of long series: their curves are wrong where their difference from ours is large and that of R with default knots is not. ' +
  'R with default knots differs by about 1e-4 for its basis and for its rounded 1/3.';

/** Fewest points of a series that is fitted. */
const LEAST_POINTS = 100;

class UsageError extends Error {}

const wholeNumber = (text: string, option: string, least: number) => {
  const value = Number(text);
  if (!(Number.isInteger(value) && value >= least))
    throw new UsageError(`--${option} takes whole numbers of at least ${least}, not "${text}"`);
  return value;
};

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      sizes: { type: 'string', default: '1000,10000,100000,1000000' },
      repeats: { type: 'string', default: '5' },
      json: { type: 'boolean', default: false },
    },
  });
  const { BENCH_FOLDER: folder, BENCH_ROOT: root } = process.env;
  if (!folder || !root) throw new Error('run it with: npm run bench -- baseline');
  const repeats = wholeNumber(values.repeats, 'repeats', 1);
  const counts = values.sizes.split(',').map((size) => wholeNumber(size, 'sizes', LEAST_POINTS));
  const say = (text: string) => (values.json ? process.stderr : process.stdout).write(`${text}\n`);
  const { found, missing } = findYardsticks(join(root, 'tools', 'bench', 'baseline'), folder);
  for (const name of missing) say(`${name} is not installed: left out.`);

  const quadReference = join(root, 'fixtures', 'reference', 'quad-smoothing-spline.json');
  const sizes: SizeFigures[] = [];
  for (const n of counts) {
    say(`measuring ${n.toLocaleString('en')} points …`);
    sizes.push(measureSize(n, repeats, found, quadReference));
  }
  const lots = measureLots(repeats);
  const allocated = await measureEvaluators();
  const targets = judgeTargets(sizes, allocated);
  const programs = [`Node ${process.versions.node}`, ...found.map(({ name, program }) => program ?? name)];
  if (values.json) {
    const figures = { programs, processor: cpus()[0]?.model, repeats, sizes, lots, allocated, targets };
    process.stdout.write(`${JSON.stringify(figures, null, 2)}\n`);
    return;
  }
  say(`\n${programs.join(', ')}; medians of ${repeats}; every point its own lot\n`);
  say(`${sizeTables(sizes)}\n\n${NOTE}\n\n${lotLines(lots)}\n${allocationLines(allocated)}\n\n${targetLines(targets)}`);
}

main().catch((error: Error & { code?: string }) => {
  const isUsage = error instanceof UsageError || error.code?.startsWith('ERR_PARSE_ARGS');
  process.stderr.write(`${isUsage ? error.message : (error.stack ?? error.message)}\n`);
  process.exit(isUsage ? 2 : 1);
});

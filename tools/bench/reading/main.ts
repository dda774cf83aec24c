import { execFileSync } from 'node:child_process';
import { cpus } from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { bareRead } from '../bare-read';
import { writeReadings, type Layout } from './files';
import { ourRead } from './our-read';

const LAYOUTS: readonly Layout[] = ['long', 'wide'];
/** Readings of the two files whose peak memory is compared. */
const SMALL = 50_000;
const LARGE = 500_000;

const say = (text: string) => process.stdout.write(`${text}\n`);
const median = (values: number[]) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];
const numbers = (text: string) =>
  text.split(',').map((one) => {
    const value = Number(one);
    if (!(Number.isInteger(value) && value > 0)) throw new Error(`not a whole number above 0: "${one}"`);
    return value;
  });

interface Cost {
  wall: number;
  /** Of all threads, so that it says little of what else the machine does. */
  processor: number;
}

async function costOf(read: () => Promise<unknown>): Promise<Cost> {
  const [begun, used] = [performance.now(), process.cpuUsage()];
  await read();
  const { user, system } = process.cpuUsage(used);
  return { wall: (performance.now() - begun) / 1000, processor: (user + system) / 1e6 };
}

/** Reads turn by turn, so that whatever else the machine does meets both; the first turn only warms up. */
async function compare(path: string, layout: Layout, size: number, repeats: number): Promise<void> {
  const bare: Cost[] = [];
  const ours: Cost[] = [];
  for (let turn = 0; turn <= repeats; turn += 1) {
    bare.push(await costOf(() => bareRead(path)));
    ours.push(await costOf(() => ourRead(path, size)));
  }
  const told = (['wall', 'processor'] as const).map((kind) => {
    const [yardstick, own] = [bare, ours].map((costs) => median(costs.slice(1).map((cost) => cost[kind])));
    return `${kind} time ${yardstick.toFixed(2)} s and ${own.toFixed(2)} s: ${(own / yardstick).toFixed(2)} ×`;
  });
  say(`${layout}, ${size.toLocaleString('en').padStart(7)} readings, bare read and to readings: ${told.join('; ')}`);
}

/** Peak resident memory, in MB, of a process of its own that reads the file, or that reads nothing. */
const peakOf = (path: string, size: number): number =>
  Number(
    execFileSync(process.execPath, [process.argv[1], '--one', path, '--sizes', String(size)], { encoding: 'utf8' }),
  );

async function measureMemory(folder: string): Promise<void> {
  const nothing = peakOf('', 1);
  for (const layout of LAYOUTS) {
    const peaks: number[] = [];
    for (const size of [SMALL, LARGE]) {
      const path = join(folder, `${layout}-${size}.xlsx`);
      await writeReadings(path, layout, size);
      peaks.push(peakOf(path, size));
    }
    const [small, large] = peaks;
    say(
      `${layout}, peak memory of the process: ${small.toFixed(0)} MB for ${SMALL.toLocaleString('en')} readings, ${large.toFixed(0)} MB for ${LARGE.toLocaleString('en')}: ${(large / small).toFixed(2)} × (${nothing.toFixed(0)} MB without reading)`,
    );
  }
}

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      sizes: { type: 'string', default: '50000,200000' },
      repeats: { type: 'string', default: '5' },
      one: { type: 'string' },
    },
  });
  const sizes = numbers(values.sizes);
  if (values.one !== undefined) {
    if (values.one !== '') await ourRead(values.one, sizes[0]);
    process.stdout.write(String(process.resourceUsage().maxRSS / 1024));
    return;
  }
  const { BENCH_FOLDER: folder } = process.env;
  if (!folder) throw new Error('run it with: npm run bench -- reading');
  const [repeats] = numbers(values.repeats);
  say(`Node ${process.versions.node}, ${cpus()[0]?.model}; medians of ${repeats}\n`);
  for (const layout of LAYOUTS) {
    for (const size of sizes) {
      const path = join(folder, `${layout}-${size}.xlsx`);
      await writeReadings(path, layout, size);
      await compare(path, layout, size, repeats);
    }
  }
  await measureMemory(folder);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});

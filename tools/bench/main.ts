import { join } from 'node:path';
import { parseArgs } from 'node:util';
import type { IntakeView, PlanView } from '@app/contracts';
import { createDatabase } from '@app/data';
import { migrateToLatest } from '../../database/migrate';
import { bareRead } from './bare-read';
import { CHANNELS, LOTS_PER_SHIFT, PASSWORD, seedBenchPlant, SHIFT_SECONDS } from './bench-plant';
import { writeBenchWorkbook } from './bench-workbook';
import { BenchClient, BenchServer } from './server';

const HISTORY_DAYS = 30;
const HISTORY_READINGS_PER_LOT = 5;
const PORT = 3900 + (process.pid % 90);
const say = (text: string) => process.stdout.write(`${text}\n`);

const quantile = (values: number[], share: number) =>
  [...values].sort((a, b) => a - b)[Math.min(values.length - 1, Math.floor(share * values.length))];
const median = (values: number[]) => quantile(values, 0.5);
const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

async function until<T>(what: string, look: () => Promise<T>, isSo: (seen: T) => boolean, everyMs: number): Promise<T> {
  const end = performance.now() + 600_000;
  for (;;) {
    const seen = await look();
    if (isSo(seen)) return seen;
    if (performance.now() > end) throw new Error(`not in ten minutes: ${what}`);
    await pause(everyMs);
  }
}

interface Bench {
  server: BenchServer;
  engineer: BenchClient;
  manager: BenchClient;
  lineId: number;
  folder: string;
  /** Epoch seconds and number of the next lot. */
  nextAt: number;
  nextLot: number;
}

async function write(
  bench: Bench,
  shifts: number,
  readingsPerLotAndChannel: number,
): Promise<{ path: string; readings: number }> {
  const path = join(bench.folder, `bench-${bench.nextLot}.xlsx`);
  const readings = await writeBenchWorkbook({
    path,
    startsAt: bench.nextAt,
    shifts,
    readingsPerLotAndChannel,
    firstLot: bench.nextLot,
    seed: bench.nextLot,
  });
  bench.nextAt += shifts * SHIFT_SECONDS;
  bench.nextLot += shifts * LOTS_PER_SHIFT;
  return { path, readings };
}

/** Uploads and confirms; seconds from the upload to what was recognised, and from the confirmation to scored. */
async function takeIn(bench: Bench, path: string): Promise<{ readSeconds: number; scoreSeconds: number }> {
  const begun = performance.now();
  const received = await bench.engineer.upload<IntakeView>(`lines/${bench.lineId}/intakes`, path);
  const read = await until(
    'read',
    () => bench.engineer.send<IntakeView>('GET', `intakes/${received.id}`),
    (intake) => intake.state !== 'received',
    100,
  );
  if (!read.isConfirmable)
    throw new Error(`not confirmable: ${read.failure ?? JSON.stringify(read.problems.slice(0, 3))}`);
  const confirmed = performance.now();
  await bench.engineer.send('POST', `intakes/${received.id}/confirm`);
  await until(
    'scored',
    () => bench.engineer.send<IntakeView>('GET', `intakes/${received.id}`),
    (intake) => intake.state === 'scored',
    50,
  );
  return { readSeconds: (confirmed - begun) / 1000, scoreSeconds: (performance.now() - confirmed) / 1000 };
}

/** Thirty days of history, then a plan in force on every channel. */
async function prepare(bench: Bench, channelIds: number[]): Promise<void> {
  const { path } = await write(bench, HISTORY_DAYS * 3, HISTORY_READINGS_PER_LOT);
  await takeIn(bench, path);
  for (const channelId of channelIds) {
    const draft = await bench.engineer.send<PlanView>('POST', `channels/${channelId}/plans`, { reason: 'bench' });
    await until(
      'proposed',
      () => bench.manager.send<PlanView>('GET', `plans/${draft.id}`),
      (plan) => plan.state === 'proposed',
      50,
    );
    await bench.manager.send('POST', `plans/${draft.id}/approval`, { password: PASSWORD });
  }
  await pause(5_000);
}

/** Latencies of a page's reads, one after the other, until `isOver`. */
async function probe(bench: Bench, isOver: () => boolean): Promise<number[]> {
  const paths = [`lines/${bench.lineId}/strip`, `lots?lineId=${bench.lineId}`, 'me', 'holds?status=open'];
  const latencies: number[] = [];
  for (let turn = 0; !isOver(); turn++) {
    const begun = performance.now();
    await bench.manager.send('GET', paths[turn % paths.length]);
    latencies.push(performance.now() - begun);
    await pause(10);
  }
  return latencies;
}

async function measure(bench: Bench, size: number, repeats: number) {
  const perLot = Math.max(1, Math.round(size / (LOTS_PER_SHIFT * CHANNELS.length)));
  const bare: number[] = [];
  const read: number[] = [];
  const score: number[] = [];
  let peak = 0;
  let readings = 0;
  for (let repeat = 0; repeat < repeats; repeat++) {
    const file = await write(bench, 1, perLot);
    readings = file.readings;
    bare.push(await bareRead(file.path));
    bench.server.resetPeak();
    const taken = await takeIn(bench, file.path);
    read.push(taken.readSeconds);
    score.push(taken.scoreSeconds);
    peak = Math.max(peak, bench.server.peakMegabytes());
  }
  const result = { readings, bare: median(bare), read: median(read), score: median(score), peak };
  say(
    `${String(readings).padStart(7)} readings: bare read ${result.bare.toFixed(2)} s, upload → recognised ${result.read.toFixed(2)} s (${(result.read / result.bare).toFixed(2)} ×), ` +
      `confirm → scored ${result.score.toFixed(2)} s (${(result.score / result.bare).toFixed(2)} ×), peak memory ${result.peak.toFixed(0)} MB`,
  );
  return result;
}

async function measureLatency(bench: Bench): Promise<void> {
  const idleUntil = performance.now() + 15_000;
  const idle = await probe(bench, () => performance.now() > idleUntil);
  const files = [await write(bench, 1, 521), await write(bench, 1, 521)];
  let isDone = false;
  const busyProbe = probe(bench, () => isDone);
  for (const file of files) await takeIn(bench, file.path);
  isDone = true;
  const busy = await busyProbe;
  const [p99Idle, p99Busy] = [quantile(idle, 0.99), quantile(busy, 0.99)];
  say(
    `API p99: idle ${p99Idle.toFixed(1)} ms (n = ${idle.length}), during intakes of 50,000 readings ${p99Busy.toFixed(1)} ms (n = ${busy.length}): ${(p99Busy / p99Idle).toFixed(2)} ×; ` +
      `median ${median(idle).toFixed(1)} and ${median(busy).toFixed(1)} ms`,
  );
}

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: { sizes: { type: 'string', default: '5000,50000,200000' }, repeats: { type: 'string', default: '5' } },
  });
  const { BENCH_DATABASE_ADMIN_URL: adminUrl, BENCH_DIST: dist, BENCH_FOLDER: folder } = process.env;
  if (!adminUrl || !dist || !folder) throw new Error('run it with: npm run bench');
  const admin = createDatabase(adminUrl, { min: 0, max: 1 });
  await admin.raw('create database bench');
  await admin.destroy();
  const url = new URL(adminUrl);
  url.pathname = '/bench';
  const databaseUrl = url.toString();
  await migrateToLatest(databaseUrl);
  const nextAt = Math.floor(Date.now() / 1000 / SHIFT_SECONDS) * SHIFT_SECONDS - (HISTORY_DAYS + 15) * 86_400;
  const plant = await seedBenchPlant(databaseUrl, new Date((nextAt - 86_400) * 1000));
  let server = await BenchServer.start(dist, databaseUrl, PORT);
  try {
    const engineer = await BenchClient.signIn(server.url, 'engineer@bench.example', PASSWORD);
    const manager = await BenchClient.signIn(server.url, 'manager@bench.example', PASSWORD);
    const bench: Bench = {
      server,
      engineer,
      manager,
      lineId: [...plant.lineIds.values()][0],
      folder,
      nextAt,
      nextLot: 100_001,
    };
    say(
      `${CHANNELS.length} channels, ${LOTS_PER_SHIFT} lots a shift, ${HISTORY_DAYS} days of history; medians of ${values.repeats}`,
    );
    await prepare(bench, [...plant.channelIds.values()]);
    say(
      `Peak memory while 30 days came in one workbook and eight plans were approved: ${server.peakMegabytes().toFixed(0)} MB. Started again before the intakes.`,
    );
    await server.stop();
    server = bench.server = await BenchServer.start(dist, databaseUrl, PORT);
    const results: Awaited<ReturnType<typeof measure>>[] = [];
    for (const size of values.sizes.split(',').map(Number))
      results.push(await measure(bench, size, Number(values.repeats)));
    const of = (size: number) => results.find(({ readings }) => Math.abs(readings - size) < 0.02 * size);
    const [middle, large] = [of(50_000), of(200_000)];
    if (middle && large) say(`200,000 against 50,000 readings: ${(large.score / middle.score).toFixed(2)} ×`);
    await measureLatency(bench);
  } finally {
    await server.stop();
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});

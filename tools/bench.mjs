/** `npm run bench`: how long an intake takes, with `reading` how long a workbook takes to be read, with `baseline` how long a fit takes, each against yardsticks in the same run. See --help. */
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describeFailure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const HELP = `npm run bench                      confirm → scored for 5,000, 50,000 and 200,000 readings, memory, and the API's p99
npm run bench -- --sizes 5000,50000 --repeats 3   smaller

Eight channels, twelve lots a shift, thirty days of history; medians. Each time is also given as a ratio to exceljs's bare
streaming read of the same file in the same run: only the ratios compare between machines. It has a database of its own.

npm run bench -- reading           workbooks of 50,000 and 200,000 readings, long and wide, to readings: time against exceljs's bare streaming read of the
                                   same file, and the peak memory of a process that reads 50,000 against one that reads 500,000; no database
npm run bench -- reading --sizes 50000 --repeats 3   smaller

npm run bench -- baseline          exact smoothing-spline fits with leverages and scores, 1,000 to 1,000,000 points, no database
npm run bench -- baseline --sizes 1000,10000 --repeats 3   smaller
npm run -s bench -- baseline --json > figures.json         the figures as JSON on stdout, what is being done on stderr

At a fixed smoothness and with one chosen by generalised cross-validation; medians of 5. Beside it, where they are installed, R's smooth.spline
(Rscript) and SciPy's make_smoothing_spline (python3), each timed inside its own process without start-up and reading, on the same doubles; and the
floor: reading and writing the same arrays once. Tells times, ratios, growth from 100,000 to 1,000,000 points, how far the curves lie apart,
what lots of many points cost, what a candidate of the smoothness allocates, and which of the lib's targets are met.`;

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
/** As a plant would run it: every commit waits for the disk. */
const CLUSTER_OPTIONS = ['max_connections=100', 'timezone=UTC'];

async function main() {
  checkNode(root);
  const { programList } = await import('./support/programs.mjs');
  const { ensurePackages } = await import('./support/packages.mjs');
  const { build, isBuilt } = await import('./support/build.mjs');
  const { startThrowAwayCluster } = await import('./support/throw-away-cluster.mjs');
  const programs = programList();
  const dist = path.join(root, 'dist');
  try {
    const folder = mkdtempSync(path.join(tmpdir(), 'ebbline-bench-'));
    programs.removeFolderAtEnd(folder);
    await ensurePackages(root, programs, path.join(folder, 'npm-ci.log'));
    if (!isBuilt(root, dist)) await build({ root, dist, programs, log: path.join(folder, '%.log') });
    const run = (file, args, env) =>
      programs.run({
        name: 'the bench',
        command: process.execPath,
        args: ['--expose-gc', path.join(dist, 'tools', file), ...args],
        env: { ...process.env, ...env, BENCH_FOLDER: folder },
        log: 'inherit',
        timeoutSeconds: 3600,
        onFailure: 'The bench failed: look at the lines above.',
      });
    const args = process.argv.slice(2);
    if (args[0] === 'baseline') {
      await run('bench-baseline.js', args.slice(1), { BENCH_ROOT: root });
      return;
    }
    if (args[0] === 'reading') {
      await run('bench-reading.js', args.slice(1), {});
      return;
    }
    const cluster = await startThrowAwayCluster(programs, CLUSTER_OPTIONS);
    await run('bench.js', args, { BENCH_DATABASE_ADMIN_URL: cluster.adminUrl, BENCH_DIST: dist });
    await cluster.stop();
  } finally {
    await programs.stopAll();
  }
}

if (process.argv.includes('--help')) console.log(HELP);
else
  main().catch((error) => {
    console.error(`\n${describeFailure(error)}`);
    process.exit(1);
  });

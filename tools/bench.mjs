/** `npm run bench`: how long an intake takes, against the bare reading of the same file in the same run. See --help. */
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describeFailure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const HELP = `npm run bench                      confirm → scored for 5,000, 50,000 and 200,000 readings, memory, and the API's p99
npm run bench -- --sizes 5000,50000 --repeats 3   smaller

Eight channels, twelve lots a shift, thirty days of history; medians. Each time is also given as a ratio to exceljs's bare
streaming read of the same file in the same run: only the ratios compare between machines. It has a database of its own.`;

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
    const cluster = await startThrowAwayCluster(programs, CLUSTER_OPTIONS);
    await programs.run({
      name: 'the bench',
      command: process.execPath,
      args: ['--expose-gc', path.join(dist, 'tools', 'bench.js'), ...process.argv.slice(2)],
      env: { ...process.env, BENCH_DATABASE_ADMIN_URL: cluster.adminUrl, BENCH_DIST: dist, BENCH_FOLDER: folder },
      log: 'inherit',
      timeoutSeconds: 3600,
    });
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

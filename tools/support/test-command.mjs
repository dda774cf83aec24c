import { mkdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { installFromDebian, onPath } from './debian.mjs';
import { ensurePackages } from './packages.mjs';
import { listPostgres } from './postgres-binaries.mjs';
import { programList } from './programs.mjs';
import { duration, say } from './say.mjs';
import { chosenStages, inLanes } from './stages.mjs';
import { chooseDist, testEnvironment, testRun } from './test-run.mjs';
import { stopAsked } from './stop-asked.mjs';
import { startThrowAwayCluster } from './throw-away-cluster.mjs';
import { sumCounts, totalsLine } from './totals.mjs';

/** What Debian must provide for the chosen stages. */
function missingPackages(stages) {
  const has = (name) => stages.some((stage) => stage.name === name);
  const needsDatabase = ['data', 'api', 'reliability', 'browser'].some(has);
  return [
    needsDatabase && listPostgres().length === 0 && 'postgresql',
    has('browser') && !onPath('chromium', '/usr/bin') && 'chromium',
    needsDatabase && !onPath('redis-server', '/usr/bin:/usr/local/bin') && 'redis-server',
  ].filter(Boolean);
}

async function prepare(root, stages, programs) {
  const logs = path.join(tmpdir(), `ebbline-test-logs-${process.getuid()}`);
  mkdirSync(logs, { recursive: true });
  await ensurePackages(root, programs, path.join(logs, 'npm-ci.log'));
  const missing = missingPackages(stages);
  if (missing.length === 0) return;
  await installFromDebian(missing, `The tests need ${missing.join(', ')}.`, programs, path.join(logs, 'apt-get.log'));
}

async function runStages({ root, stages, programs, isVerbose, endsAt }) {
  const cluster = await startThrowAwayCluster(programs);
  const dist = chooseDist(root);
  const env = testEnvironment(process.env, { adminUrl: cluster.adminUrl, dist });
  const run = testRun({ root, env, dist, programs, isVerbose, endsAt });
  const { beside, alone } = inLanes(stages);
  await Promise.all(beside.map(run.runLane));
  await run.runLane(alone);
  run.close();
  await cluster.stop();
  return run.counts;
}

/** Runs the chosen stages; prints the totals as the last line and answers the exit code. */
export async function runTests(root, { only, isVerbose, minutes }) {
  const startedAt = Date.now();
  const endsAt = startedAt + minutes * 60_000;
  const programs = programList();
  void stopAsked(() => process.exit(130)).then(async ({ signal }) => {
    say(`\nEnded by ${signal}`);
    await programs.stopAll();
    process.exit(130);
  });
  const stages = chosenStages(only);
  try {
    await prepare(root, stages, programs);
    const totals = sumCounts(await runStages({ root, stages, programs, isVerbose, endsAt }));
    say(`\nAll of it took ${duration(startedAt)}`);
    say(totalsLine(totals));
    return totals.failed === 0 && totals.passed > 0 ? 0 : 1;
  } finally {
    await programs.stopAll();
  }
}

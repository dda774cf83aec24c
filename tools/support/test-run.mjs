import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { build, isBuilt } from './build.mjs';
import { isDistInUse } from './dist-in-use.mjs';
import { describeJestFailures, lastLines } from './failure-output.mjs';
import { Failure, describeFailure } from './failure.mjs';
import { npm } from './packages.mjs';
import { duration, say } from './say.mjs';
import { countJest, readReport } from './totals.mjs';

/** Settings of a person's own trial or servers; no test may see them. */
const NOT_PASSED_ON = /^(DATABASE_URL|REDIS_URL|SMTP_URL|PORT|NODE_ENV|EBBLINE_.*|CATCHER_.*)$/;

export function testEnvironment(env, { adminUrl, dist }) {
  const own = Object.fromEntries(Object.entries(env).filter(([key]) => !NOT_PASSED_ON.test(key)));
  return { ...own, TEST_DATABASE_ADMIN_URL: adminUrl, EBBLINE_DIST: dist, FORCE_COLOR: '0', CI: 'true' };
}

/** Where this run finds the build: dist, unless that is out of date while a running `npm start` serves from it. */
export function chooseDist(root) {
  const dist = path.join(root, 'dist');
  if (isBuilt(root, dist) || !isDistInUse(dist)) return dist;
  return path.join(root, 'node_modules', '.cache', 'ebbline-test-dist');
}

/** Runs stages one by one or in lanes, says how each went, and keeps the counts. */
export function testRun({ root, env, dist, programs, isVerbose, endsAt }) {
  const folder = mkdtempSync(path.join(tmpdir(), 'ebbline-stages-'));
  programs.removeFolderAtEnd(folder);
  const counts = [];
  const logOf = (name) => (isVerbose ? 'inherit' : path.join(folder, `${name}.log`));
  const secondsFor = (stage) => Math.min(stage.minutes * 60, (endsAt - Date.now()) / 1000);

  async function runCheck(stage) {
    const result = await programs.attempt({
      name: stage.name,
      ...npm(['run', '-s', stage.script]),
      cwd: root,
      env,
      log: logOf(stage.name),
      timeoutSeconds: secondsFor(stage),
    });
    return {
      passed: result.isOk ? 1 : 0,
      failed: result.isOk ? 0 : 1,
      remarks: lateness(stage, result),
      log: logOf(stage.name),
    };
  }

  async function runJest(stage) {
    const report = path.join(folder, `${stage.name}.json`);
    const args = ['--selectProjects', stage.name, '--json', `--outputFile=${report}`, '--forceExit'];
    const result = await programs.attempt({
      name: stage.name,
      command: process.execPath,
      args: [path.join(root, 'node_modules', 'jest', 'bin', 'jest.js'), ...args, ...(stage.args ?? ['--maxWorkers=2'])],
      cwd: root,
      env,
      log: logOf(stage.name),
      timeoutSeconds: secondsFor(stage),
    });
    const count = countJest(readReport(report), result.code);
    return {
      ...count,
      remarks: [...lateness(stage, result), ...count.remarks],
      report: readReport(report),
      log: logOf(stage.name),
    };
  }

  async function runBuild(stage) {
    if (isBuilt(root, dist)) return { passed: 1, failed: 0, remarks: ['dist is up to date'] };
    try {
      await build({
        root,
        dist,
        programs,
        log: isVerbose ? 'inherit' : path.join(folder, '%.log'),
        timeoutSeconds: secondsFor(stage),
      });
      return { passed: 1, failed: 0, remarks: [] };
    } catch (error) {
      if (!(error instanceof Failure)) throw error;
      return { passed: 0, failed: 1, remarks: [], output: describeFailure(error) };
    }
  }

  const kinds = { check: runCheck, jest: runJest, build: runBuild };

  async function runStage(stage) {
    const startedAt = Date.now();
    const isOutOfTime = secondsFor(stage) <= 1;
    if (!isOutOfTime) say(`${stage.name} …`);
    const result = isOutOfTime
      ? { passed: 0, failed: 1, remarks: ['not run: out of time'] }
      : await kinds[stage.kind](stage);
    counts.push(result);
    sayResult(stage, result, startedAt);
  }

  async function runLane(stages) {
    for (const stage of stages) await runStage(stage);
  }

  return { runLane, counts, close: () => rmSync(folder, { recursive: true, force: true }) };
}

function lateness(stage, { isLate, isStopped, error }) {
  if (isLate) return [`ended because it took longer than its ${stage.minutes} minutes or than the whole run may take`];
  if (error) return [error.message];
  return isStopped ? ['ended early'] : [];
}

function sayResult(stage, result, startedAt) {
  const remarks = result.remarks.length > 0 ? ` (${result.remarks.join('; ')})` : '';
  say(`${stage.name}: ${result.passed} passed, ${result.failed} failed, ${duration(startedAt)}${remarks}`);
  if (result.failed === 0) return;
  const output = result.output ?? (describeJestFailures(result.report) || lastLines(result.log));
  if (output) say(`${output.replaceAll(/^/gm, '  | ')}\n`);
}

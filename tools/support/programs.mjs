import { spawn } from 'node:child_process';
import { closeSync, existsSync, openSync, readFileSync, renameSync, statSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { Failure } from './failure.mjs';
import { isGroupAlive, signal, waitUntil } from './processes.mjs';

const LOG_BYTES = 5 * 1024 * 1024;

function openLog(file) {
  if (existsSync(file) && statSync(file).size > LOG_BYTES) renameSync(file, `${file}.old`);
  const offset = existsSync(file) ? statSync(file).size : 0;
  return { handle: openSync(file, 'a', 0o600), offset };
}

/** The last lines of what a program wrote to its log since it was started. */
function tailOf(file, offset, lines = 20) {
  if (!file) return '';
  const text = readFileSync(file).subarray(offset).toString('utf8').trimEnd();
  return text.split('\n').slice(-lines).join('\n');
}

/**
 * Starts programs, each in a process group of its own (so that Ctrl-C in the terminal reaches only us), and ends them in
 * the reverse order. A guard process ends them too if this process is killed.
 */
export function programList() {
  const guard = spawn(process.execPath, [fileURLToPath(new URL('guard.mjs', import.meta.url))], {
    detached: true,
    cwd: '/',
    stdio: ['pipe', 'ignore', 'ignore'],
  });
  guard.stdin.on('error', () => {});
  guard.unref();
  guard.stdin.unref?.();
  const tellGuard = (order) => guard.stdin.write(`${JSON.stringify(order)}\n`);
  const running = [];
  let isClosed = false;

  /**
   * Starts a program. `log` is a file for its output ("inherit" shows it); `isGroup: false` sends the stop signal to the
   * program alone. Answers with `ended`, a promise of how it ended, and `stop()`.
   */
  function launch({ name, command, args, log = 'inherit', cwd, env, uid, gid, isGroup = true, ...rules }) {
    if (isClosed) throw new Failure(`${name} was not started: everything is being ended.`);
    const { stopSignal = 'SIGTERM', graceSeconds = 15, force = 'SIGKILL' } = rules;
    const { handle, offset } = log === 'inherit' || log === 'ignore' ? {} : openLog(log);
    const output = handle ?? log;
    const child = spawn(command, args, { cwd, env, uid, gid, detached: true, stdio: ['ignore', output, output] });
    if (handle !== undefined) closeSync(handle);
    const program = {
      name,
      pid: child.pid,
      hasEnded: false,
      tail: () => tailOf(handle === undefined ? '' : log, offset),
    };
    program.ended = new Promise((resolve) => {
      const finish = (outcome) => {
        program.hasEnded = true;
        if (running.includes(program)) running.splice(running.indexOf(program), 1);
        if (program.pid) tellGuard({ remove: program.pid });
        resolve(outcome);
      };
      child.once('error', (error) => finish({ code: 127, signal: null, error }));
      child.once('exit', (code, killedBy) => finish({ code, signal: killedBy }));
    });
    program.stop = async (impatience = 1) => {
      if (program.hasEnded || !program.pid) return;
      const target = isGroup ? -program.pid : program.pid;
      program.isStopping = true;
      signal(target, stopSignal);
      const isGone = () => program.hasEnded && !(isGroup && isGroupAlive(program.pid));
      if (!(await waitUntil(isGone, graceSeconds * impatience))) signal(target, force);
      await program.ended;
    };
    if (program.pid) tellGuard({ add: { pid: program.pid, isGroup, signal: stopSignal, graceSeconds, force } });
    running.push(program);
    return program;
  }

  /** Runs a program to its end. Answers whether it went well, how long it may take bounded by `timeoutSeconds`. */
  async function attempt({ timeoutSeconds = 600, ...what }) {
    const program = launch({ graceSeconds: 5, ...what });
    let isLate = false;
    const timer = setTimeout(() => {
      isLate = true;
      void program.stop();
    }, timeoutSeconds * 1000);
    const outcome = await program.ended;
    clearTimeout(timer);
    return {
      ...outcome,
      isLate,
      isStopped: Boolean(program.isStopping),
      isOk: outcome.code === 0 && !isLate,
      tail: program.tail(),
    };
  }

  /** Runs a program to its end; a failure becomes the sentence `onFailure` with the end of its output. */
  async function run({ onFailure, ...what }) {
    const result = await attempt(what);
    if (result.isOk) return result;
    const reason = result.isLate
      ? `It took longer than ${what.timeoutSeconds ?? 600} s.`
      : (result.error?.message ?? '');
    throw new Failure(onFailure, { detail: [reason, result.tail].filter(Boolean).join('\n') });
  }

  /** Ends everything, the latest first; nothing can be started afterwards. */
  async function stopAll(impatience) {
    isClosed = true;
    for (const program of [...running].reverse()) await program.stop(impatience);
  }

  return {
    launch,
    attempt,
    run,
    stopAll,
    running,
    removeFolderAtEnd: (folder) => tellGuard({ removeFolder: path.resolve(folder) }),
  };
}

import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';

/** Whether a process with this id exists (also one that belongs to somebody else). */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

function readProc(pid, name) {
  try {
    return readFileSync(`/proc/${pid}/${name}`, 'utf8');
  } catch {
    return undefined;
  }
}

/** Something that tells a process from a later one with the same id; undefined where there is no /proc. */
export function startMark(pid) {
  const stat = readProc(pid, 'stat');
  // The command name (field 2) may hold spaces and brackets: count from behind its closing bracket. Field 22: start time.
  return stat?.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
}

/** The command line of a process with its arguments joined by spaces, or an empty text. */
export function commandLine(pid) {
  const fromProc = readProc(pid, 'cmdline');
  if (fromProc !== undefined) return fromProc.replaceAll('\0', ' ').trim();
  const ps = spawnSync('ps', ['-o', 'command=', '-p', String(pid)], { encoding: 'utf8' });
  return ps.status === 0 ? ps.stdout.trim() : '';
}

/** Sends a signal to a process or, with a negative id, to its group; false when it is no longer there. */
export function signal(pid, name) {
  try {
    process.kill(pid, name);
    return true;
  } catch {
    return false;
  }
}

export const sleep = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

/** Waits until `isDone()` holds; false when that took longer than `seconds`. */
export async function waitUntil(isDone, seconds, everyMilliseconds = 50) {
  const deadline = Date.now() + seconds * 1000;
  while (!(await isDone())) {
    if (Date.now() > deadline) return false;
    await sleep(everyMilliseconds);
  }
  return true;
}

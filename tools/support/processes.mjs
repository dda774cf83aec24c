import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';

function readProc(pid, name) {
  try {
    return readFileSync(`/proc/${pid}/${name}`, 'utf8');
  } catch {
    return undefined;
  }
}

/** The fields of /proc/<pid>/stat from the third on (state, parent, group …); undefined where there is no /proc. */
function statFields(pid) {
  const stat = readProc(pid, 'stat');
  // The command name (field 2) may hold spaces and brackets: count from behind its closing bracket.
  return stat?.slice(stat.lastIndexOf(')') + 2).split(' ');
}

function exists(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/** Whether a process with this id runs (also somebody else's); one that has ended and was not collected does not. */
export const isAlive = (pid) => exists(pid) && statFields(pid)?.[0] !== 'Z';

/** Whether a process of this group runs. */
export function isGroupAlive(group) {
  if (!exists(-group)) return false;
  if (!existsSync('/proc/self/stat')) return true;
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .some((pid) => {
      const fields = statFields(pid);
      return fields?.[2] === String(group) && fields[0] !== 'Z';
    });
}

/** Something that tells a process from a later one with the same id (field 22: its start time); undefined without /proc. */
export const startMark = (pid) => statFields(pid)?.[19];

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

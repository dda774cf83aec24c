import { closeSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';
import path from 'node:path';
import { isAlive, startMark } from './processes.mjs';

function readHolder(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/** A holder counts while its process runs and is still the one that took the lock, not a later one with its id. */
function isHeld(holder) {
  if (!holder || !isAlive(holder.pid)) return false;
  const mark = startMark(holder.pid);
  return mark === undefined || holder.mark === undefined || mark === holder.mark;
}

/**
 * Takes `<folder>/running.lock` for this process. Answers `{release}`, or `{holder}` when a living process has it.
 * A lock that a killed process left behind is taken over.
 */
export function takeLock(folder, details = {}) {
  const file = path.join(folder, 'running.lock');
  for (;;) {
    try {
      const handle = openSync(file, 'wx', 0o600);
      writeSync(handle, JSON.stringify({ pid: process.pid, mark: startMark(process.pid), ...details }));
      closeSync(handle);
      return { release: () => rmSync(file, { force: true }) };
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    const holder = readHolder(file);
    if (isHeld(holder)) return { holder };
    rmSync(file, { force: true });
  }
}

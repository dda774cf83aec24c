import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { isAlive, startMark } from './processes.mjs';

const folderOf = (dist) => path.join(dist, '.in-use');

/** Notes that this process serves from `dist`, until the function that it answers with is called. */
export function useDist(dist) {
  const file = path.join(folderOf(dist), `${process.pid}-${startMark(process.pid) ?? ''}`);
  try {
    mkdirSync(folderOf(dist), { recursive: true });
    writeFileSync(file, '');
  } catch {
    // A build that is not ours to write to is not ours to rebuild either.
  }
  return () => rmSync(file, { force: true });
}

/** Whether a living process serves from `dist`; notes that killed ones left behind do not count. */
export function isDistInUse(dist) {
  let names;
  try {
    names = readdirSync(folderOf(dist));
  } catch {
    return false;
  }
  return names.some((name) => {
    const [pid, mark] = name.split('-');
    return isAlive(Number(pid)) && (startMark(Number(pid)) ?? '') === mark;
  });
}

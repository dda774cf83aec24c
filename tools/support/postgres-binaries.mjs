import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { installFromDebian, onPath } from './debian.mjs';
import { Failure } from './failure.mjs';

const DEBIAN = '/usr/lib/postgresql';

/** Every installed PostgreSQL: Debian's, newest first, then the one on PATH. `major` is unknown for the latter. */
export function listPostgres(debianRoot = DEBIAN, pathVariable = process.env.PATH) {
  const majors = existsSync(debianRoot) ? readdirSync(debianRoot).filter((name) => /^\d+$/.test(name)) : [];
  const found = majors
    .sort((a, b) => Number(b) - Number(a))
    .map((major) => ({ major, bin: path.join(debianRoot, major, 'bin') }))
    .filter(({ bin }) => existsSync(`${bin}/postgres`) && existsSync(`${bin}/initdb`));
  const initdb = onPath('initdb', pathVariable);
  return initdb && onPath('postgres', pathVariable)
    ? [...found, { major: undefined, bin: path.dirname(initdb) }]
    : found;
}

/** The folder of PostgreSQL's programs; installed first when there is none. */
export async function ensurePostgres(programs, log) {
  if (listPostgres().length === 0) {
    await installFromDebian(['postgresql'], 'PostgreSQL is not installed.', programs, log);
  }
  const [newest] = listPostgres();
  if (!newest) throw new Failure(`PostgreSQL was installed, but there is no initdb under ${DEBIAN} or on PATH.`);
  return newest.bin;
}

/** The programs that can read a cluster of this major version. */
export function binariesFor(major, clusterDir) {
  const all = listPostgres();
  const match = all.find((one) => one.major === major) ?? all.find((one) => one.major === undefined);
  if (match) return match.bin;
  const there = all.map((one) => one.major).join(', ');
  throw new Failure(
    `The data in ${clusterDir} was written by PostgreSQL ${major}, and only PostgreSQL ${there} is installed. ` +
      `Install postgresql-${major}, or start with another EBBLINE_DATA_DIR.`,
  );
}

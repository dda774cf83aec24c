import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { chownSync, existsSync, realpathSync, statSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';

const isRoot = () => process.getuid?.() === 0;

/**
 * Whom PostgreSQL runs as. It refuses root: then it is whoever owns the cluster already, or Debian's user postgres.
 * Undefined means: as ourselves.
 */
export function serverUser(clusterDir) {
  if (!isRoot()) {
    if (existsSync(clusterDir) && statSync(clusterDir).uid !== process.getuid()) {
      throw new Failure(`${clusterDir} belongs to another user: start as that user, or with another EBBLINE_DATA_DIR.`);
    }
    return undefined;
  }
  if (existsSync(clusterDir)) {
    const { uid, gid } = statSync(clusterDir);
    if (uid !== 0) return { uid, gid };
  }
  const ask = (flag) => spawnSync('id', [flag, 'postgres'], { encoding: 'utf8' });
  const [uid, gid] = [ask('-u'), ask('-g')];
  if (uid.status === 0 && gid.status === 0) return { uid: Number(uid.stdout), gid: Number(gid.stdout) };
  throw new Failure(
    'PostgreSQL does not run as root and there is no user postgres: create it (`useradd --system postgres`), or start as an ordinary user.',
  );
}

/** Whether that user can enter the folder through all its parents. */
export function canEnter(folder, user) {
  if (!user) return true;
  return spawnSync('test', ['-x', folder], { ...user, cwd: '/' }).status === 0;
}

/**
 * Where the cluster of a data folder stands: in it, or, when the server's user cannot enter that, under /var/lib with a
 * name made from the folder's path.
 */
export function placeCluster(dataDir) {
  const inside = path.join(dataDir, 'postgres');
  const user = serverUser(inside);
  if (canEnter(dataDir, user)) return { dir: inside, user, isElsewhere: false };
  const mark = createHash('sha256').update(realpathSync(dataDir)).digest('hex').slice(0, 12);
  const dir = `/var/lib/ebbline-${mark}/postgres`;
  return { dir, user: serverUser(dir), isElsewhere: true };
}

/** Gives a file or folder to the server's user. */
export function giveTo(target, user) {
  if (user) chownSync(target, user.uid, user.gid);
}

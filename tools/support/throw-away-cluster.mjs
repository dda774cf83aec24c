import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createCluster, databaseUrl, startCluster } from './cluster.mjs';
import { Failure } from './failure.mjs';
import { listPostgres } from './postgres-binaries.mjs';
import { installCommand } from './debian.mjs';
import { canEnter, giveTo, serverUser } from './server-user.mjs';

/** Nothing in it outlives the tests, so nothing waits for the disk. */
const OPTIONS = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'max_connections=200', 'timezone=UTC'];

function temporaryFolder(user) {
  const parent = [tmpdir(), '/tmp', '/var/tmp'].find((folder) => canEnter(folder, user));
  if (!parent) throw new Failure("There is no temporary folder that PostgreSQL's user can enter: set TMPDIR.");
  const folder = mkdtempSync(path.join(parent, 'ebbline-test-'));
  giveTo(folder, user);
  return folder;
}

/** Starts a cluster of its own in a temporary folder; `stop()` ends it and removes the folder. A bench hands in options that do wait for the disk. */
export async function startThrowAwayCluster(programs, options = OPTIONS) {
  const [newest] = listPostgres();
  if (!newest) throw new Failure(`PostgreSQL is not installed. Run \`${installCommand(['postgresql'])}\` as root.`);
  const user = serverUser('');
  const folder = temporaryFolder(user);
  programs.removeFolderAtEnd(folder);
  const password = randomBytes(18).toString('base64url');
  const place = {
    dir: path.join(folder, 'data'),
    user,
    bin: newest.bin,
    programs,
    log: path.join(folder, 'postgresql.log'),
  };
  await createCluster({ ...place, password, isThrowAway: true });
  const { server, port } = await startCluster({ ...place, options });
  const stop = async () => {
    await server.stop();
    rmSync(folder, { recursive: true, force: true, maxRetries: 5, retryDelay: 100 });
  };
  return { adminUrl: databaseUrl({ password, port }, 'postgres'), server, stop };
}

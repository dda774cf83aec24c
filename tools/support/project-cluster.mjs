import { existsSync, renameSync } from 'node:fs';
import path from 'node:path';
import { clusterVersion, createCluster, startCluster } from './cluster.mjs';
import { binariesFor } from './postgres-binaries.mjs';
import { say, step } from './say.mjs';
import { placeCluster } from './server-user.mjs';

/** A cluster whose password is lost with its data folder is of no use to anyone here; it is kept aside, not deleted. */
function putAside(dir) {
  const aside = `${dir}.before-${new Date().toISOString().replaceAll(/[-:]|\..*/g, '')}`;
  renameSync(dir, aside);
  say(`A database of an earlier data folder was kept as ${aside}`);
}

/** Opens the database server of a data folder; at the first time it is made. Answers where it is and its port. */
export async function openProjectCluster({ dataDir, secrets, bin, wantedPort, programs }) {
  const { dir, user, isElsewhere } = placeCluster(dataDir);
  const common = { dir, user, programs, password: secrets.databasePassword };
  const log = (name) => path.join(dataDir, 'logs', name);
  if (existsSync(dir) && secrets.isNew) putAside(dir);
  const isNew = !existsSync(dir);
  if (isNew) await step('Making the database cluster', () => createCluster({ ...common, bin, log: log('initdb.log') }));
  if (isElsewhere) say(`The database stands in ${dir}: PostgreSQL's user cannot enter ${dataDir}`);
  const started = await startCluster({
    ...common,
    bin: binariesFor(clusterVersion(dir), dir),
    wantedPort,
    log: log('postgresql.log'),
  });
  return { ...started, dir, isNew, password: secrets.databasePassword };
}

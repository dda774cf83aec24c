import { existsSync } from 'node:fs';
import path from 'node:path';
import { databaseUrl } from './cluster.mjs';
import { readNotes } from './data-folder.mjs';
import { Failure } from './failure.mjs';
import { takeLock } from './lock.mjs';
import { programList } from './programs.mjs';
import { openProjectCluster } from './project-cluster.mjs';
import { placeCluster } from './server-user.mjs';
import { readSettings } from './settings.mjs';

/**
 * Calls `use` with the environment of a command that works on the database of a data folder: the one that runs, or, when
 * Ebbline is stopped, its database server alone for as long as the command takes.
 */
export async function withTrialDatabase(root, env, use) {
  const { dataDir, port } = readSettings(env, root);
  if (!existsSync(path.join(dataDir, 'secrets.json')) || !existsSync(placeCluster(dataDir).dir))
    throw new Failure(`There is no installation in ${dataDir}: npm start makes one, or set DATABASE_URL.`);
  const secrets = { ...readNotes(dataDir, 'secrets.json'), isNew: false };
  const ports = readNotes(dataDir, 'ports.json');
  const environment = (databasePort, appPort) => ({
    ...env,
    DATABASE_URL: databaseUrl({ password: secrets.databasePassword, port: databasePort }, 'ebbline'),
    EBBLINE_PUBLIC_URL: env.EBBLINE_PUBLIC_URL || `http://127.0.0.1:${appPort}`,
  });
  const { release, holder } = takeLock(dataDir, { port });
  if (holder) return use(environment(ports.postgres, holder.port));
  const programs = programList();
  try {
    const cluster = await openProjectCluster({ dataDir, secrets, wantedPort: ports.postgres, programs });
    return use(environment(cluster.port, port));
  } finally {
    await programs.stopAll();
    release();
  }
}

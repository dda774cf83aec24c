import path from 'node:path';
import { build, isBuilt } from './build.mjs';
import { openDataFolder, readNotes, readSecrets, writeNotes } from './data-folder.mjs';
import { useDist } from './dist-in-use.mjs';
import { Failure } from './failure.mjs';
import { takeLock } from './lock.mjs';
import { ensurePackages } from './packages.mjs';
import { checkPort, freePort } from './ports.mjs';
import { ensurePostgres } from './postgres-binaries.mjs';
import { programList } from './programs.mjs';
import { openProjectCluster } from './project-cluster.mjs';
import { duration, say, step } from './say.mjs';
import { readSettings, refuseProduction } from './settings.mjs';
import { stopAsked } from './stop-asked.mjs';
import { prepareDatabase, printFirstLink } from './trial-database.mjs';
import { launchApp, launchCatcher } from './trial-programs.mjs';
import { sayWelcome } from './welcome.mjs';

function lockDataFolder(dataDir, port) {
  const { release, holder } = takeLock(dataDir, { port });
  if (release) return release;
  throw new Failure(
    `Ebbline already runs from ${dataDir} (process ${holder.pid}, http://127.0.0.1:${holder.port}). ` +
      'End it, or start a second one with another EBBLINE_DATA_DIR and PORT.',
  );
}

/** Ports beside PORT: chosen at the first start, kept while they are free. */
async function choosePorts(dataDir, appPort) {
  const kept = readNotes(dataDir, 'ports.json');
  const smtp = await freePort(kept.smtp, [appPort]);
  const mailPage = await freePort(kept.mailPage, [appPort, smtp]);
  return { ...kept, smtp, mailPage };
}

async function bringUp(context) {
  const { root, settings, programs, log } = context;
  const { dataDir } = settings;
  await ensurePackages(root, programs, log('npm-ci.log'));
  const bin = await ensurePostgres(programs, log('apt-get.log'));
  const dist = path.join(root, 'dist');
  if (!isBuilt(root, dist)) await step('Building', () => build({ root, dist, programs, log: log('%.log') }));
  context.leaveDist = useDist(dist);
  const secrets = readSecrets(dataDir);
  const ports = await choosePorts(dataDir, settings.port);
  const cluster = await openProjectCluster({ dataDir, secrets, bin, wantedPort: ports.postgres, programs });
  writeNotes(dataDir, 'ports.json', { ...ports, postgres: cluster.port });
  const trial = { ...context, dist, secrets, ports, cluster };
  const catcher = await launchCatcher(trial);
  const database = await prepareDatabase(trial);
  const app = await launchApp({ ...trial, ...database });
  return { ...trial, ...database, watched: [cluster.server, catcher, app] };
}

/** The first of the programs that ends by itself. */
const firstToEnd = (watched) =>
  Promise.race(watched.map(async (program) => ({ program, outcome: await program.ended })));

function describeEnd({ program, outcome }) {
  const how = outcome.signal ? `was ended by ${outcome.signal}` : `ended with code ${outcome.code}`;
  return new Failure(`${program.name} ${how}, so everything is being ended.`, { detail: program.tail() });
}

/** Runs the trial until it is asked to stop or something fails; answers the exit code. */
export async function start(root, env) {
  const startedAt = Date.now();
  refuseProduction(env);
  const settings = readSettings(env, root);
  openDataFolder(settings.dataDir);
  const release = lockDataFolder(settings.dataDir, settings.port);
  const programs = programList();
  const stop = stopAsked(() => programs.stopAll(0.1));
  const context = {};
  process.stdout.on('error', () => {});
  process.stderr.on('error', () => {});
  try {
    await checkPort(settings.port);
    const log = (name) => path.join(settings.dataDir, 'logs', name);
    const up = bringUp(Object.assign(context, { root, env, settings, programs, log }));
    up.catch(() => {});
    const early = await Promise.race([up, stop]);
    if (early.signal) {
      say('\nEnding what was begun …');
      return 130;
    }
    sayWelcome(early, duration(startedAt));
    if (!early.isDemo) await Promise.race([printFirstLink(early), stop]);
    const end = await Promise.race([firstToEnd(early.watched), stop]);
    if (end.program) throw describeEnd(end);
    say('\nEnding Ebbline …');
    return 0;
  } finally {
    await programs.stopAll();
    context.leaveDist?.();
    release();
  }
}

import path from 'node:path';
import { databaseUrl } from './cluster.mjs';
import { Failure } from './failure.mjs';
import { waitUntil } from './processes.mjs';

/** What the surrounding shell may have set for other servers must not reach a trial. */
const NOT_PASSED_ON = ['REDIS_URL', 'DATABASE_URL', 'SMTP_URL', 'EBBLINE_DIST'];

/** The environment of every program of the trial. */
export function trialEnvironment({ env, settings, secrets, ports, cluster }) {
  const own = Object.fromEntries(Object.entries(env).filter(([key]) => !NOT_PASSED_ON.includes(key)));
  return {
    ...own,
    DATABASE_URL: databaseUrl(cluster, 'ebbline'),
    PORT: String(settings.port),
    EBBLINE_JWT_SECRET: env.EBBLINE_JWT_SECRET || secrets.jwtSecret,
    EBBLINE_SECRET_ORIGIN: env.EBBLINE_JWT_SECRET ? 'environment' : 'generated',
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    EBBLINE_MAIL_CATCHER: '1',
    EBBLINE_MAIL_CATCHER_URL: `http://127.0.0.1:${ports.mailPage}`,
    EBBLINE_PUBLIC_URL: `http://127.0.0.1:${settings.port}`,
    EBBLINE_DATA_DIR: settings.dataDir,
    EBBLINE_SEED: settings.seed,
  };
}

async function answers(url) {
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(2000) });
    await response.arrayBuffer();
    return response.ok;
  } catch {
    return false;
  }
}

async function launchAndWait({ programs, url, seconds, ...what }) {
  const program = programs.launch(what);
  const inTime = await waitUntil(async () => program.hasEnded || (await answers(url)), seconds, 60);
  if (inTime && !program.hasEnded) return program;
  const problem = program.hasEnded ? 'ended at once' : `did not answer ${url} within ${seconds} s`;
  throw new Failure(`${what.name} ${problem}: look at the lines below.`, { detail: program.tail() });
}

export function launchCatcher(trial) {
  const { dist, settings, ports, programs, log } = trial;
  return launchAndWait({
    programs,
    name: 'The mail catcher',
    command: process.execPath,
    args: [path.join(dist, 'apps', 'mail-catcher', 'main.js')],
    env: {
      ...trialEnvironment(trial),
      CATCHER_SMTP_PORT: String(ports.smtp),
      CATCHER_HTTP_PORT: String(ports.mailPage),
      CATCHER_DIR: path.join(settings.dataDir, 'mails'),
    },
    log: log('mail-catcher.log'),
    graceSeconds: 5,
    url: `http://127.0.0.1:${ports.mailPage}/health`,
    seconds: 30,
  });
}

/** API, worker and web in one process. */
export function launchApp(trial) {
  const { dist, settings, programs, log, isDemo } = trial;
  return launchAndWait({
    programs,
    name: 'The app',
    command: process.execPath,
    args: [path.join(dist, 'apps', 'api', 'main.js')],
    env: { ...trialEnvironment(trial), ...(isDemo && { EBBLINE_DEMO: '1' }) },
    log: log('app.log'),
    graceSeconds: 20,
    url: `http://127.0.0.1:${settings.port}/api/health/ready`,
    seconds: 90,
  });
}

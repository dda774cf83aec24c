import path from 'node:path';
import { Failure } from './failure.mjs';

function readPort(text) {
  if (text === undefined || text === '') return 3000;
  const port = Number(text);
  if (Number.isInteger(port) && port >= 1 && port <= 65535) return port;
  throw new Failure(`PORT is "${text}": it must be a whole number from 1 to 65535.`);
}

function readSeed(text) {
  if (text === undefined || text === '') return 'demo';
  if (text === 'demo' || text === 'empty') return text;
  throw new Failure(`EBBLINE_SEED is "${text}": it must be "demo" or "empty".`);
}

function readDemoPassword(text) {
  if (text === undefined || text === '') return undefined;
  if (text.length >= 8) return text;
  throw new Failure('EBBLINE_DEMO_PASSWORD is too short: it must have at least 8 characters.');
}

/** What `npm start` can be told through the environment. */
export function readSettings(env, root) {
  return {
    port: readPort(env.PORT),
    dataDir: path.resolve(root, env.EBBLINE_DATA_DIR || '.data'),
    seed: readSeed(env.EBBLINE_SEED),
    demoPassword: readDemoPassword(env.EBBLINE_DEMO_PASSWORD),
  };
}

/** `npm start` is a trial set-up; it does not run where NODE_ENV says that real work is done. */
export function refuseProduction(env) {
  if (env.NODE_ENV !== 'production') return;
  throw new Failure(
    [
      'npm start does not run with NODE_ENV=production, because it would use',
      '  - demo sign-ins with one shared password,',
      '  - a secret for access tokens that was generated and is kept in the data folder,',
      '  - a mail catcher that delivers nothing.',
      'In production run `npm run start:api` and `npm run start:worker` with DATABASE_URL, REDIS_URL, SMTP_URL and EBBLINE_JWT_SECRET.',
    ].join('\n'),
  );
}

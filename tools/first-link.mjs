/** `npm run first-link`: the link with which the administrator of an installation without a plant begins. See --help. */
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describeFailure, Failure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const HELP = `npm run first-link   prints a link, good once for seven days, with which the administrator of an installation without a plant begins

  DATABASE_URL          the installation's database, migrated; without it, that of the data folder of npm start, running or stopped
  EBBLINE_DATA_DIR      the data folder (.data)
  EBBLINE_PUBLIC_URL    where people reach the pages (http://127.0.0.1:PORT)
  EBBLINE_ADMIN_EMAIL   the administrator's address (administrator@localhost); it can be changed when the link is used

The link before it ends. npm start prints one at every start until it has been used.`;

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');

async function main() {
  checkNode(root);
  const dist = path.resolve(root, process.env.EBBLINE_DIST || 'dist');
  const program = path.join(dist, 'tools', 'first-link.js');
  if (!existsSync(program)) throw new Failure('Ebbline is not built yet: run npm start, or npm run build.');
  const print = (env) => spawnSync(process.execPath, [program], { env, stdio: 'inherit' }).status ?? 1;
  if (process.env.DATABASE_URL) return print(process.env);
  const { withTrialDatabase } = await import('./support/trial-database-alone.mjs');
  return withTrialDatabase(root, process.env, print);
}

if (process.argv.includes('--help')) {
  console.log(HELP);
} else {
  main().then(
    (code) => process.exit(code),
    (error) => {
      console.error(describeFailure(error));
      process.exit(error.exitCode ?? 1);
    },
  );
}

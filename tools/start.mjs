/** `npm start`: everything that a trial of Ebbline needs, from a fresh clone to the address to open. See --help. */
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describeFailure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const HELP = `npm start   installs what is missing, makes a database in the data folder, builds, and runs Ebbline with demo data

  PORT                   where the web and the API answer on 127.0.0.1 (3000)
  EBBLINE_DATA_DIR       database, secrets, mails and logs (.data)
  EBBLINE_SEED           demo (a plant with six weeks of readings) or empty (demo)
  EBBLINE_DEMO_PASSWORD  of the demo sign-ins, at the first start (else one is generated)
  EBBLINE_ADMIN_EMAIL    of who begins an empty installation, by the link that each start prints until it is used (administrator@localhost)

Ctrl-C ends everything that it started. To begin afresh, end it and delete the data folder.`;

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');

async function main() {
  checkNode(root);
  const { start } = await import('./support/trial.mjs');
  return start(root, process.env);
}

if (process.argv.includes('--help')) {
  console.log(HELP);
} else {
  main().then(
    (code) => process.exit(code),
    (error) => {
      console.error(`\n${describeFailure(error)}`);
      process.exit(error.exitCode ?? 1);
    },
  );
}

/** `npm test`: everything that is checked, from a fresh clone to one line of totals. See --help. */
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describeFailure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const HELP = `npm test                        lint, types, format, build, and the tests of each kind, on a database of its own
npm test -- --only unit,api     only these of: lint types format build unit data api reliability browser
npm test -- --verbose           with all that the stages print
npm test -- --minutes 30        how long all of it may take (45)

The last line is "N passed, N failed". A check and the build count as one each; a skipped test, a spec file that
cannot run and a kind without tests count as failed. A running npm start is left alone.`;

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');

async function main() {
  checkNode(root);
  const { readOptions } = await import('./support/stages.mjs');
  const options = readOptions(process.argv.slice(2));
  if (options.isHelp) {
    console.log(HELP);
    return 0;
  }
  const { runTests } = await import('./support/test-command.mjs');
  return runTests(root, options);
}

main().then(
  (code) => process.exit(code),
  (error) => {
    console.log(`\n${describeFailure(error)}\n\n0 passed, 1 failed`);
    process.exit(1);
  },
);

/** `npm run build`: the server programs and the web, into dist/ (or the folder that EBBLINE_DIST names). */
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from './support/build.mjs';
import { describeFailure } from './support/failure.mjs';
import { programList } from './support/programs.mjs';
import { duration, say } from './support/say.mjs';

if (process.argv.includes('--help')) {
  say('node tools/build.mjs   builds dist/ (EBBLINE_DIST names another folder)');
  process.exit(0);
}
const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
const programs = programList();
for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'])
  process.on(name, () => void programs.stopAll().then(() => process.exit(130)));
const startedAt = Date.now();
try {
  await build({ root, dist: path.resolve(root, process.env.EBBLINE_DIST || 'dist'), programs, log: 'inherit' });
  say(`Built in ${duration(startedAt)}`);
} catch (error) {
  say(describeFailure(error));
  process.exitCode = 1;
}

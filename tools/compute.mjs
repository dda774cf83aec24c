/** `npm run -s compute -- fit < series.csv`: bundles the command when its sources changed, then runs it. See tools/compute. */
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { Failure, describeFailure } from './support/failure.mjs';
import { checkNode } from './support/node-version.mjs';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');

async function main() {
  checkNode(root);
  if (!existsSync(path.join(root, 'node_modules', 'csv-parse')))
    throw new Failure('The packages are not installed: run npm ci first.', { exitCode: 2 });
  // webpack and its rules look for packages from where they are started.
  process.chdir(root);
  const { bundleCommand } = await import('./support/command-bundle.mjs');
  const dist = path.resolve(root, process.env.EBBLINE_DIST || 'dist');
  createRequire(import.meta.url)(
    await bundleCommand({ root, dist, name: 'compute', folders: ['libs/baseline', 'tools/compute'] }),
  );
}

main().catch((error) => {
  process.stderr.write(`${describeFailure(error)}\n`);
  process.exitCode = error.exitCode ?? 1;
});

import { closeSync, existsSync, mkdtempSync, mkdirSync, openSync, readSync, renameSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { isBuilt } from './build.mjs';
import { sourcesHash } from './build-stamp.mjs';
import { Failure } from './failure.mjs';

const require = createRequire(import.meta.url);

/** The first line of a bundle made here: which sources it was made from. */
const headLine = (hash) => `// sources ${hash}`;

function beginsWith(file, line) {
  if (!existsSync(file)) return false;
  const handle = openSync(file, 'r');
  const head = Buffer.alloc(line.length);
  readSync(handle, head, 0, head.length, 0);
  closeSync(handle);
  return head.toString() === line;
}

/** Bundles one entry with the project's own webpack rules. */
async function bundle(root, entry, outputFolder, banner) {
  const webpack = require('webpack');
  const config = require(path.join(root, 'webpack.config.cjs'));
  const compiler = webpack({
    ...config,
    entry: { bundle: entry },
    output: { ...config.output, path: outputFolder, filename: '[name].js' },
    plugins: [new webpack.BannerPlugin({ banner, raw: true })],
    cache: false,
    devtool: false,
  });
  const stats = await new Promise((resolve, reject) =>
    compiler.run((error, result) => (error ? reject(error) : resolve(result))),
  );
  await new Promise((resolve) => compiler.close(resolve));
  if (stats.hasErrors())
    throw new Failure('The command could not be built from its sources.', {
      detail: stats.toString({ all: false, errors: true, colors: false }),
    });
}

/**
 * The file of the command `tools/<name>/main.ts`, bundled from the sources as they are. It is made anew when it was made from others: in a
 * folder of its own and moved into place whole, so that commands started side by side never read half a file.
 */
export async function bundleCommand({ root, dist, name, folders }) {
  const file = path.join(dist, 'tools', `${name}.js`);
  const line = headLine(sourcesHash(root, folders));
  if (beginsWith(file, line) || (existsSync(file) && isBuilt(root, dist))) return file;
  mkdirSync(path.dirname(file), { recursive: true });
  const folder = mkdtempSync(path.join(dist, 'tools', `.${name}-`));
  try {
    await bundle(root, path.join(root, 'tools', name, 'main.ts'), folder, line);
    renameSync(path.join(folder, 'bundle.js'), file);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
  return file;
}

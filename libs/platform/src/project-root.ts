import { existsSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';

/** The folder of package.json, seen from a bundle in dist/ or from the sources. */
export function projectRoot(): string {
  let folder = __dirname;
  while (!existsSync(join(folder, 'package.json'))) {
    const parent = dirname(folder);
    if (parent === folder) throw new Error(`No package.json above ${__dirname}`);
    folder = parent;
  }
  return folder;
}

/**
 * The built file of a worker thread, by the name of its source without `.ts`: beside the bundle that asks, or, asked from the sources, in
 * the build that `EBBLINE_DIST` names.
 */
export function threadFile(name: string): string {
  for (let folder = __dirname; folder !== dirname(folder); folder = dirname(folder))
    if (existsSync(join(folder, 'threads', `${name}.js`))) return join(folder, 'threads', `${name}.js`);
  return join(resolve(projectRoot(), process.env.EBBLINE_DIST ?? 'dist'), 'threads', `${name}.js`);
}

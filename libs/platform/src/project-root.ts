import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';

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

/** The built file of a worker thread, by the name of its source without `.ts`. */
export function threadFile(name: string): string {
  return join(projectRoot(), 'dist', 'threads', `${name}.js`);
}

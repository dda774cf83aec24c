import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const FOLDERS = ['apps', 'libs', 'database', 'tools'];
const FILES = ['package.json', 'package-lock.json', 'tsconfig.json', 'webpack.config.cjs'];
/** Specs and the plain scripts that surround the build are no part of it. */
const isSource = (file) => !/\.spec\.tsx?$|\.mjs$/.test(file);

function listSources(root, folders) {
  const inFolders = folders
    .filter((folder) => existsSync(path.join(root, folder)))
    .flatMap((folder) =>
      readdirSync(path.join(root, folder), { recursive: true, withFileTypes: true })
        .filter((entry) => entry.isFile())
        .map((entry) => path.join(entry.parentPath ?? entry.path, entry.name)),
    );
  const alone = FILES.map((file) => path.join(root, file)).filter((file) => existsSync(file));
  return [...inFolders.filter(isSource), ...alone].sort();
}

/** One hash over the paths and bytes of everything that goes into dist, or of what stands in some folders only. */
export function sourcesHash(root, folders = FOLDERS) {
  const hash = createHash('sha256');
  for (const file of listSources(root, folders)) {
    const bytes = readFileSync(file);
    hash.update(`${path.relative(root, file)}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex');
}

const stampFile = (dist) => path.join(dist, '.sources');

/** Whether `dist` was built from sources with this hash. */
export const isBuiltFrom = (dist, hash) =>
  existsSync(stampFile(dist)) && readFileSync(stampFile(dist), 'utf8') === hash;

export function stampBuild(dist, hash) {
  mkdirSync(dist, { recursive: true });
  writeFileSync(stampFile(dist), hash);
}

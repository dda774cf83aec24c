import { rmSync } from 'node:fs';
import path from 'node:path';
import { isBuiltFrom, sourcesHash, stampBuild } from './build-stamp.mjs';
import { npm } from './packages.mjs';

/** The two halves of the build, side by side: server programs (webpack) and the web (vite). */
const HALVES = ['build:server', 'build:web'];

/** Builds into `dist` and stamps it with the hash that the sources had when the build began. */
export async function build({ root, dist, programs, log, timeoutSeconds = 300 }) {
  const hash = sourcesHash(root);
  rmSync(path.join(dist, '.sources'), { force: true });
  const half = (script) =>
    programs.run({
      name: script,
      ...npm(['run', '-s', script]),
      cwd: root,
      env: { ...process.env, EBBLINE_DIST: dist },
      log: log === 'inherit' ? log : log.replace('%', script.replace(':', '-')),
      timeoutSeconds,
      onFailure: `The build failed (npm run ${script}): look at the lines below.`,
    });
  const results = await Promise.allSettled(HALVES.map(half));
  const failed = results.find((result) => result.status === 'rejected');
  if (failed) throw failed.reason;
  stampBuild(dist, hash);
}

export const isBuilt = (root, dist) => isBuiltFrom(dist, sourcesHash(root));

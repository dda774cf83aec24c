import { join, resolve } from 'node:path';

const ROOT = resolve(__dirname, '../..');

/** A file of the build: dist/, or wherever `npm test` has built to so that a running trial keeps its own. */
export function distPath(...parts: string[]): string {
  return join(process.env.EBBLINE_DIST ?? join(ROOT, 'dist'), ...parts);
}

import { existsSync } from 'node:fs';
import { join } from 'node:path';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { projectRoot } from '@app/platform';
import express, { type NextFunction, type Request, type Response } from 'express';

/** Where the built pages lie: beside this program's bundle, or in the project's dist/ when it runs from its sources. */
export function webFolder(): string | undefined {
  const hasPages = (folder: string) => existsSync(join(folder, 'index.html'));
  const beside = join(__dirname, '..', 'web');
  if (hasPages(beside)) return beside;
  const built = join(projectRoot(), 'dist', 'apps', 'web');
  return hasPages(built) ? built : undefined;
}

/** Serves the pages: hashed assets for good, and for every other address that a browser opens the one page that routes by itself. */
export function serveWebPages(app: NestExpressApplication, folder: string): void {
  const isApi = (request: Request) => request.path === '/api' || request.path.startsWith('/api/');
  const files = express.static(folder, { index: false, redirect: false, setHeaders: cacheHeaders });
  app.use((request: Request, response: Response, next: NextFunction) => {
    if (isApi(request)) return next();
    void files(request, response, next);
  });
  app.use((request: Request, response: Response, next: NextFunction) => {
    const isPage = (request.method === 'GET' || request.method === 'HEAD') && request.accepts('html');
    if (isApi(request) || !isPage || request.path.startsWith('/assets/')) return next();
    response.setHeader('cache-control', 'no-cache');
    response.sendFile('index.html', { root: folder }, (error) => error && next(error));
  });
}

function cacheHeaders(response: Response, path: string): void {
  const isHashed = /[\\/]assets[\\/]/.test(path);
  response.setHeader('cache-control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
}

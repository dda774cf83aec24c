import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { NestExpressApplication } from '@nestjs/platform-express';
import express from 'express';
import request from 'supertest';
import { serveWebPages } from './web-pages';

describe('the web pages', () => {
  // Builds lie below hidden folders too, such as .data.
  const root = mkdtempSync(join(tmpdir(), 'pages-'));
  const folder = join(root, '.hidden', 'web');
  const app = express();
  beforeAll(() => {
    mkdirSync(join(folder, 'assets'), { recursive: true });
    writeFileSync(join(folder, 'index.html'), '<title>Ebbline</title>');
    writeFileSync(join(folder, 'theme.js'), 'theme');
    writeFileSync(join(folder, 'assets', 'main-a1b2c3.js'), 'main');
    serveWebPages(app as unknown as NestExpressApplication, folder);
    app.use((_request, response) => void response.status(404).send('the routes'));
  });
  afterAll(() => rmSync(root, { recursive: true }));

  const open = (path: string, accept = 'text/html') => request(app).get(path).set('accept', accept);

  it.each(['/', '/lots?line=3', '/holds/12', '/index.html'])(
    'answer %s with the one page, asked for anew each time',
    async (path) => {
      const response = await open(path).expect(200);
      expect(response.text).toContain('<title>Ebbline</title>');
      expect(response.headers['cache-control']).toBe('no-cache');
    },
  );

  it('keep hashed files for good and others not', async () => {
    const hashed = await open('/assets/main-a1b2c3.js').expect(200);
    expect(hashed.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect((await open('/theme.js').expect(200)).headers['cache-control']).toBe('no-cache');
  });

  it('leave the routes, missing files and other methods alone', async () => {
    await open('/api/lots').expect(404, 'the routes');
    await open('/api').expect(404, 'the routes');
    await open('/assets/gone.js').expect(404, 'the routes');
    await open('/picture.png', 'image/png').expect(404, 'the routes');
    await request(app).post('/lots').set('accept', 'text/html').expect(404, 'the routes');
  });

  it('show nothing outside their folder', async () => {
    await open('/..%2f..%2fsecret', 'text/plain').expect((response) =>
      expect(response.status).toBeGreaterThanOrEqual(400),
    );
  });
});

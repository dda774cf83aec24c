import { METHOD_METADATA } from '@nestjs/common/constants';
import { ModulesContainer } from '@nestjs/core';
import { PERMISSIONS } from '@app/contracts';
import { PERMISSION } from '../../apps/api/src/access/permit';
import { IS_PUBLIC } from '../../apps/api/src/auth/public';
import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';

type Handler = (...input: unknown[]) => unknown;

describe('the routes', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startTestApp();
  });
  afterAll(() => app.close());

  function handlers(): { name: string; handler: Handler }[] {
    const controllers = [...app.nest.get(ModulesContainer).values()].flatMap((module) => [
      ...module.controllers.values(),
    ]);
    return controllers.flatMap(({ metatype }) => {
      const prototype = metatype?.prototype as Record<string, Handler>;
      return Object.getOwnPropertyNames(prototype)
        .filter((name) => name !== 'constructor' && Reflect.hasMetadata(METHOD_METADATA, prototype[name]))
        .map((name) => ({ name: `${metatype?.name}.${name}`, handler: prototype[name] }));
    });
  }

  it('each say what they take: a permission, or nothing at all', () => {
    const found = handlers();
    expect(found.length).toBeGreaterThan(12);
    const silent = found.filter(({ handler }) => {
      const permission = Reflect.getMetadata(PERMISSION, handler) as string | undefined;
      const isPublic = Reflect.getMetadata(IS_PUBLIC, handler) === true;
      return isPublic === (permission !== undefined && permission in PERMISSIONS);
    });
    expect(silent.map(({ name }) => name)).toEqual([]);
  });

  it('are described under /api/openapi.json', async () => {
    const { body } = await app.http.get('/api/openapi.json').expect(200);
    expect(Object.keys(body.paths)).toEqual(
      expect.arrayContaining(['/api/auth/sign-in', '/api/lots/{id}', '/api/channels/{id}/record', '/api/desk']),
    );
    await app.http
      .get('/api/docs')
      .expect(200)
      .expect('content-type', /text\/html/);
  });

  it('answer what is not there as a problem', async () => {
    expectProblem(await app.http.get('/api/nothing-here'), 404, 'not-found');
  });

  it('refuse a body that is no JSON', async () => {
    const response = await app.http.post('/api/auth/sign-in').type('application/json').send('{"email":');
    expectProblem(response, 400, 'bad-request');
  });

  it('refuse a body that is too large', async () => {
    const response = await app.http.post('/api/auth/sign-in').send({ email: 'x'.repeat(2_000_000) });
    expectProblem(response, 413, 'too-large');
  });

  it('keep a number that the caller gives a request, and make one otherwise', async () => {
    const given = await app.http.get('/api/health/live').set('x-correlation-id', 'shift-2026-03-11');
    expect(given.headers['x-correlation-id']).toBe('shift-2026-03-11');
    const odd = await app.http.get('/api/health/live').set('x-correlation-id', 'a b');
    expect(odd.headers['x-correlation-id']).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('let no page run foreign scripts or frame ours', async () => {
    const { headers } = await app.http.get('/api/health/live').expect(200, { status: 'ok' });
    expect(headers['content-security-policy']).toContain("script-src 'self';");
    expect(headers['content-security-policy']).toContain("frame-ancestors 'none'");
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['x-powered-by']).toBeUndefined();
  });

  it('tell that the program is ready while its database answers', async () => {
    await app.http.get('/api/health/ready').expect(200, { status: 'ok' });
  });

  it('tell nothing of an error that nobody foresaw', async () => {
    const broken = await startTestApp();
    try {
      await broken.database.raw('drop table sign_in_failures');
      const response = await broken.http
        .post('/api/auth/sign-in')
        .send({ email: 'engineer@marrowby.example', password: 'anything' });
      expectProblem(response, 500, 'internal-error');
      expect(JSON.stringify(response.body)).not.toContain('sign_in_failures');
    } finally {
      await broken.close();
    }
  });
});

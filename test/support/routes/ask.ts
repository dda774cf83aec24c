import type { Response } from 'supertest';
import type { Asked, Row } from './row';
import type { Headers, World } from './world';

/** Asks a route, such as "POST /api/holds/{id}/decision". */
export async function ask(
  world: World,
  route: string,
  row: Pick<Row, 'isStream'>,
  asked: Asked,
  headers?: Headers,
): Promise<Response> {
  const [method, path] = route.split(' ');
  const address = path.replaceAll(/\{(\w+)\}/g, (_, name: string) => {
    const value = asked.at?.[name];
    if (value === undefined) throw new Error(`${route}: the row says nothing for {${name}}.`);
    return encodeURIComponent(value);
  });
  const request = world.app.http[method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete'](address);
  if (headers) void request.set(headers);
  if (asked.query) void request.query(asked.query);
  if (asked.cookie) void request.set('cookie', asked.cookie);
  if (asked.file) return request.attach('file', asked.file.bytes, asked.file.name);
  if (row.isStream) void request.timeout({ response: 5_000, deadline: 10_000 });
  return asked.body ? request.send(asked.body) : request;
}

export interface Operation {
  /** "GET /api/plants" */
  route: string;
  permission: string | null;
}

const METHODS = ['get', 'post', 'put', 'patch', 'delete'];

/** Every route that the program tells of. */
export async function listOperations(world: Pick<World, 'app'>): Promise<Operation[]> {
  const { body } = await world.app.http.get('/api/openapi.json').expect(200);
  const paths = body.paths as Record<string, Record<string, { 'x-permission'?: string }>>;
  return Object.entries(paths).flatMap(([path, operations]) =>
    Object.entries(operations)
      .filter(([method]) => METHODS.includes(method))
      .map(([method, operation]) => ({
        route: `${method.toUpperCase()} ${path}`,
        permission: operation['x-permission'] ?? null,
      })),
  );
}

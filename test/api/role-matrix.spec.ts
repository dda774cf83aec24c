import type { Response } from 'supertest';
import { ask, listOperations, type Operation } from '../support/routes/ask';
import type { Row } from '../support/routes/row';
import { ROUTES_WITH_ROW, ROWS } from '../support/routes/rows';
import { isOfAPlant, mayBe, ONE_ROLE_EACH } from '../support/routes/who';
import { openWorld, PLANT_NAME, type World } from '../support/routes/world';

/** Not 401 for want of a sign-in, not 403, not 404: whatever else it says, it has let the person in. */
function outcome({ status, body }: Response): string {
  const code = (body as { code?: string } | undefined)?.code;
  if (code === 'not-signed-in') return 'not signed in';
  // Bodies are checked before rights: with one that is turned down the row would prove nothing.
  if (code === 'invalid-input') return 'asked amiss';
  if (status === 403) return 'refused';
  if (status === 404) return 'not there';
  return status >= 500 ? `failed with ${status}` : 'let in';
}

interface Layer {
  route?: { path: string; methods: Record<string, boolean> };
}
const inBraces = (path: string) => path.replaceAll(/:(\w+)/g, '{$1}');

describe('the matrix of roles and routes', () => {
  let world: World;
  let operations: Operation[];
  beforeAll(async () => {
    world = await openWorld();
    operations = await listOperations(world);
  });
  afterAll(() => world.app.close());

  it('has a row for every route, and a route for every row', () => {
    expect([...ROUTES_WITH_ROW].sort()).toEqual(operations.map(({ route }) => route).sort());
  });

  it('knows of every route that the program answers, told of or not', () => {
    const adapter = world.app.nest.getHttpAdapter().getInstance() as { router: { stack: Layer[] } };
    const answered = adapter.router.stack.flatMap(({ route }) =>
      route ? Object.keys(route.methods).map((method) => `${method.toUpperCase()} ${inBraces(route.path)}`) : [],
    );
    // The description itself, and the one answer to whatever is not there.
    const beside = /^GET \/api\/(docs|openapi)|^[A-Z-]+ \/api(\/\{\*path})?$/;
    expect([...new Set(answered)].filter((route) => !beside.test(route)).sort()).toEqual([...ROUTES_WITH_ROW].sort());
  });

  it('names the permission that each route tells of itself', () => {
    const told = Object.fromEntries(operations.map(({ route, permission }) => [route, permission]));
    const expected = Object.fromEntries(Object.entries(ROWS).map(([route, { permission }]) => [route, permission]));
    expect(told).toEqual(expected);
  });

  // Those who may not ask first: what the others change stays out of their answers.
  describe.each(Object.entries(ROWS))('%s', (route: string, row: Row) => {
    const may = mayBe(row.who);
    const asOne = async (who: keyof World['as']) => ask(world, route, row, row.asked?.(world) ?? {}, world.as[who]);

    it('answers nobody only what needs no sign-in', async () => {
      const answer = await ask(world, route, row, row.asked?.(world) ?? {});
      expect(outcome(answer)).toBe(row.permission === 'public' ? 'let in' : 'not signed in');
    });

    it('tells somebody of another plant nothing of this one', async () => {
      const answer = await asOne('stranger');
      expect(outcome(answer)).toBe(isOfAPlant(row.who) ? 'not there' : 'let in');
      expect(JSON.stringify(answer.body)).not.toContain(PLANT_NAME);
    });

    it(`lets in ${may.join(', ')} and no other role`, async () => {
      const answers: Record<string, string> = {};
      const order = [...ONE_ROLE_EACH].sort((one, two) => Number(may.includes(one)) - Number(may.includes(two)));
      for (const who of order) answers[who] = outcome(await asOne(who));
      const expected = ONE_ROLE_EACH.map((who) => [who, may.includes(who) ? 'let in' : 'refused'] as const);
      expect(answers).toEqual(Object.fromEntries(expected));
    });
  });
});

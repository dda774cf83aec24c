import { ask } from '../support/routes/ask';
import { ROWS } from '../support/routes/rows';
import { openWorld, type World } from '../support/routes/world';

/** Somebody who may do everything at their own plant names another plant's things beside it. */
describe('things of another plant', () => {
  let world: World;
  beforeAll(async () => {
    world = await openWorld();
  });
  afterAll(() => world.app.close());

  const send = (route: string, at: Record<string, number>, body?: object, query?: Record<string, number>) =>
    ask(world, route, {}, { at, body, query }, world.as.stranger);
  const counted = async () => {
    const counts = await Promise.all(
      [
        'channels',
        'memberships',
        'line_assignments',
        'specification_proposals',
        'channel_gauges',
        'lines',
        'layouts',
      ].map(async (table) => [table, (await world.app.database(table).count())[0].count] as const),
    );
    const tokens = await world.app.database('api_tokens').whereNull('revoked_at').count();
    return { counts, tokens, colleague: await world.app.database('people').where({ id: world.colleague.id }).first() };
  };

  it('are not there behind an own plant in the address', async () => {
    const before = await counted();
    const nested = Object.entries(ROWS).filter(([route]) => /\{id\}.*\{\w+\}/.test(route));
    expect(nested.length).toBeGreaterThan(3);
    for (const [route, row] of nested) {
      const asked = row.asked?.(world) ?? {};
      const at = { ...asked.at, id: world.other.id };
      const { status } = await ask(world, route, row, { ...asked, at }, world.as.stranger);
      expect({ route, status }).toEqual({ route, status: row.ofNothing ?? 404 });
    }
    expect(await counted()).toEqual(before);
  });

  it('cannot be named in the body of a change to an own plant', async () => {
    const before = await counted();
    const { plant, other, spareGaugeId } = world;
    const [own, foreign] = [other.channels[0], plant.channels[0]];
    const since = '2026-03-10T06:00:00Z';
    const channel = { name: 'Thickness', position: 'exit', since };
    const limits = {
      nominal: 60,
      lower: 59,
      upper: 61,
      appliesToIndividuals: false,
      validFrom: since,
      reason: 'Less.',
    };
    const person = { email: 'new@overdale.example', name: 'New', roles: ['engineer'] };
    const ofOwn = { lineId: other.lines[0].id, characteristicId: own.characteristicId, gaugeId: own.gaugeId };
    const attempts: [string, Record<string, number>, object][] = [
      ...[{ lineId: plant.lines[0].id }, { characteristicId: foreign.characteristicId }, { gaugeId: spareGaugeId }].map(
        (wrong): [string, Record<string, number>, object] => [
          'POST /api/plants/{id}/set-up/channels',
          { id: other.id },
          { ...channel, ...ofOwn, ...wrong },
        ],
      ),
      ['POST /api/channels/{id}/gauges', { id: own.id }, { gaugeId: spareGaugeId, since }],
      ...[
        { productId: plant.productId, characteristicId: own.characteristicId },
        { productId: other.productId, characteristicId: foreign.characteristicId },
      ].map((wrong): [string, Record<string, number>, object] => [
        'POST /api/plants/{id}/set-up/specification-proposals',
        { id: other.id },
        { ...limits, ...wrong },
      ]),
      ['POST /api/plants/{id}/people', { id: other.id }, { ...person, lineIds: [plant.lines[0].id] }],
    ];
    for (const [route, at, body] of attempts) {
      const { status, body: answer } = await send(route, at, body);
      expect({ route, isRefused: [400, 404, 409, 422].includes(status), code: answer.code }).toEqual({
        route,
        isRefused: true,
        code: expect.not.stringMatching(/^invalid-input$/),
      });
    }
    expect(await counted()).toEqual(before);
  });

  it('do not come into lists by way of a line or a plant', async () => {
    const { plant, other } = world;
    for (const route of ['GET /api/lots', 'GET /api/holds']) {
      const byLine = await send(route, {}, undefined, { plantId: other.id, lineId: plant.lines[0].id });
      expect(byLine.status).toBe(404);
      const all = await send(route, {});
      expect(all.body).toMatchObject({ items: [], total: 0 });
    }
    const audit = await send('GET /api/plants/{id}/audit', { id: other.id }, undefined, {
      person: plant.people.manager.id,
    });
    expect(audit.body).toMatchObject({ items: [], total: 0 });
  });
});

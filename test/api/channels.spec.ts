import type { RecordView } from '@app/contracts';
import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { insertBaseline, insertBreak } from '../support/factories/record';
import { insertShift, type TestShift } from '../support/factories/shift';
import { insertFit } from '../support/factories/verdicts';

type Headers = { authorization: string };
const ms = (at: string) => Date.parse(at);

describe('channels', () => {
  let app: TestApp;
  let shift: TestShift;
  let overdale: TestPlant;
  let lead: Headers;
  let pendingId: number;
  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app);
    overdale = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    pendingId = await insertPlan(app.database, shift.plant, shift.plant.channels[1], { state: 'proposed' });
    lead = await signIn(app, 'lead@marrowby.example');
  });
  afterAll(() => app.close());

  const get = (path: string, headers: Headers = lead) => app.http.get(`/api${path}`).set(headers);

  it('are listed by line with gauge, plan in force and plan that waits', async () => {
    const [weight, thickness] = shift.plant.channels;
    const { body } = await get(`/lines/${shift.plant.lines[0].id}/channels`).expect(200);
    expect(body.total).toBe(2);
    expect(body.items[0]).toEqual({
      id: weight.id,
      name: 'Coat weight',
      lineId: shift.plant.lines[0].id,
      lineName: 'Coater 2',
      plantId: shift.plant.id,
      characteristic: { name: 'Coat weight', unit: 'g/m²', resolution: 0.01 },
      gauge: { id: weight.gaugeId, assetNumber: 'BG-204', kind: 'beta gauge', position: 'A' },
      planInForce: { id: shift.planId, revision: 1, since: '2026-03-01T10:00:00.000Z' },
      planPending: null,
      retiredSince: null,
    });
    expect(body.items[1]).toMatchObject({
      planInForce: null,
      planPending: { id: pendingId, revision: 1, state: 'proposed' },
    });
    expect((await get(`/channels/${thickness.id}`).expect(200)).body).toEqual(body.items[1]);
  });

  describe('the record', () => {
    const record = async (query = ''): Promise<RecordView & { lotCount: number }> =>
      (await get(`/channels/${shift.plant.channels[0].id}/record${query}`).expect(200)).body;

    beforeAll(async () => {
      const { plant } = shift;
      const channel = plant.channels[0];
      const fitId = await insertFit(app.database, plant, channel.id);
      await insertBaseline(app.database, plant, channel, fitId, [
        { at: '2026-03-10T21:00:00Z', value: 0.05 },
        { at: '2026-03-11T00:00:00Z', value: 0.06 },
        { at: '2026-03-11T09:30:00Z', value: -0.2 },
      ]);
      const wrong = await insertBreak(app.database, plant, channel, { at: '2026-03-11T04:00:00Z' });
      await insertBreak(app.database, plant, channel, { at: '2026-03-11T05:00:00Z', correctsId: wrong });
      const mistaken = await insertBreak(app.database, plant, channel, { at: '2026-03-10T22:00:00Z' });
      await insertBreak(app.database, plant, channel, {
        at: '2026-03-10T22:00:00Z',
        correctsId: mistaken,
        isWithdrawn: true,
      });
    });

    it('covers the last fourteen days of readings', async () => {
      const { from, to, extent, limit, lotCount } = await record();
      expect({ from, to, extent, limit, lotCount }).toEqual({
        from: ms('2026-02-25T10:30:00Z'),
        to: ms('2026-03-11T10:30:00Z'),
        extent: { from: ms('2026-03-10T20:00:00Z'), to: ms('2026-03-11T10:30:00Z') },
        limit: 3,
        lotCount: 5,
      });
    });

    it('tells of each column of pixels the least and greatest deviation from nominal', async () => {
      const { readings } = await record(`?from=${ms('2026-03-10T20:00:00Z')}&to=${ms('2026-03-11T04:00:00Z')}&width=8`);
      const middles = ['10T20:30', '10T22:30', '10T23:30', '11T01:30', '11T03:30'];
      expect(readings.at).toEqual(middles.map((at) => ms(`2026-03-${at}:00Z`)));
      const rounded = (values: number[]) => values.map((value) => Number(value.toFixed(6)));
      expect(rounded(readings.low)).toEqual([-0.1, 0.2, -0.6, -0.3, 0.4]);
      expect(rounded(readings.high)).toEqual([-0.1, 0.2, -0.6, 0.3, 0.4]);
    });

    it('parts the baseline at the break in force, with a 95 % band', async () => {
      const { baseline, breaks } = await record();
      expect(breaks).toEqual([
        {
          id: expect.any(Number),
          at: '2026-03-11T05:00:00.000Z',
          kind: 'adjustment',
          reason: 'window wiped',
          by: 'engineer',
        },
      ]);
      expect(baseline.at).toEqual([
        ms('2026-03-10T21:00:00Z'),
        ms('2026-03-11T00:00:00Z'),
        ms('2026-03-11T05:00:00Z'),
        ms('2026-03-11T09:30:00Z'),
      ]);
      expect(baseline.value).toEqual([0.05, 0.06, null, -0.2]);
      expect(baseline.low[0]).toBeCloseTo(0.05 - 0.196, 3);
      expect(baseline.high[3]).toBeCloseTo(-0.2 + 0.196, 3);
    });

    it('shows the lots with the figures of their verdict on this channel', async () => {
      const { lots } = await record();
      expect(lots.map((lot) => lot.number)).toEqual(['24117', '24118', '24119', '24120', '24121']);
      expect(lots[1]).toMatchObject({
        id: shift.lots['24118'].id,
        product: 'SEP-16',
        startsAt: ms('2026-03-10T23:00:00Z'),
        endsAt: ms('2026-03-11T01:00:00Z'),
        at: ms('2026-03-11T00:00:00Z'),
        mean: 59.55,
        nominal: 60,
        baseline: 60,
        score: -4.3,
        mark: { controlState: 'outside_control_limits', holdState: 'open' },
      });
      expect(lots[3]).toMatchObject({ score: null, mark: { controlState: 'not_scored' } });
    });

    it('of a channel without readings is empty', async () => {
      const { body } = await get(`/channels/${shift.plant.channels[1].id}/record`).expect(200);
      expect(body).toMatchObject({
        extent: null,
        lots: [],
        lotCount: 0,
        limit: null,
        readings: { at: [], low: [], high: [] },
      });
    });

    it.each([
      ['from=5&to=5', '/from'],
      ['width=0', '/width'],
      ['width=100000', '/width'],
      ['from=tomorrow', '/from'],
      ['to=1e99', '/to'],
    ])('refuses %s', async (query, pointer) => {
      const response = await get(`/channels/${shift.plant.channels[0].id}/record?${query}`);
      expectProblem(response, 400, 'invalid-input');
      expect(response.body.errors[0].pointer).toBe(pointer);
    });
  });

  it('of another plant answer as if they were not there', async () => {
    const foreign = overdale.channels[0].id;
    for (const path of [
      `/lines/${overdale.lines[0].id}/channels`,
      `/channels/${foreign}`,
      `/channels/${foreign}/record`,
    ])
      expectProblem(await get(path), 404, 'not-found');
    expectProblem(await get('/channels/999999'), 404, 'not-found');
  });

  it('need a sign-in', async () => {
    for (const path of [`/lines/1/channels`, '/channels/1', '/channels/1/record'])
      expectProblem(await app.http.get(`/api${path}`), 401, 'not-signed-in');
  });
});

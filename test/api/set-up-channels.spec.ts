import type { ChannelSetUpView, DeskView, GaugeSetUpView, Page } from '@app/contracts';
import { getLineContext } from '@app/data';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };

describe('the channels of a plant', () => {
  let app: TestApp;
  let plant: TestPlant;
  let other: TestPlant;
  let spareId: number;
  const as = {} as Record<'admin' | 'engineer' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['admin', 'engineer'] as const) as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'admin@overdale.example');
    const spare = await post(`plants/${plant.id}/set-up/gauges`, { assetNumber: 'BG-205', kind: 'beta gauge' });
    spareId = (spare.body as GaugeSetUpView).id;
  });
  afterAll(() => app.close());

  const post = (path: string, body: object, headers: Headers = as.admin) =>
    app.http.post(`/api/${path}`).set(headers).send(body);
  const patch = (path: string, body: object, headers: Headers = as.admin) =>
    app.http.patch(`/api/${path}`).set(headers).send(body);
  const list = async () =>
    (
      (await app.http.get(`/api/plants/${plant.id}/set-up/channels`).set(as.engineer).expect(200))
        .body as Page<ChannelSetUpView>
    ).items;
  const pointers = (response: { body: { errors: { pointer: string }[] } }) =>
    [...new Set(response.body.errors.map(({ pointer }) => pointer))].sort();
  const path = () => `plants/${plant.id}/set-up/channels`;
  const wanted = (changed: object = {}) => ({
    lineId: plant.lines[1].id,
    characteristicId: plant.channels[1].characteristicId,
    position: 'exit',
    name: 'Thickness',
    gaugeId: spareId,
    since: '2026-03-01T06:00:00+01:00',
    ...changed,
  });

  it('are added with the gauge that serves them, and a workbook may name them', async () => {
    const { body } = await post(path(), wanted()).expect(201);
    expect(body).toEqual({
      id: expect.any(Number),
      name: 'Thickness',
      line: plant.lines[1],
      characteristic: { id: plant.channels[1].characteristicId, name: 'Web thickness', unit: 'µm', resolution: 0.1 },
      position: 'exit',
      gauges: [{ gaugeId: spareId, assetNumber: 'BG-205', since: '2026-03-01T05:00:00.000Z', until: null }],
      hasReadings: false,
      isRetired: false,
    });
    expect(await app.database('audit_entries').orderBy('id', 'desc').first()).toMatchObject({
      thing_kind: 'channel',
      sentence: 'admin added channel Thickness on Calender 1: Web thickness by BG-205.',
    });
    const context = await getLineContext(app.database, plant.lines[1].id);
    expect(context.channels.map(({ name }) => name)).toEqual(['Thickness']);
  });

  it('have a name and a place each on their line, and parts of their own plant', async () => {
    const name = await post(path(), wanted({ position: 'entry' }));
    expectProblem(name, 409, 'name-taken');
    expect(pointers(name)).toEqual(['/name']);
    const place = await post(path(), wanted({ name: 'Other' }));
    expectProblem(place, 409, 'place-taken');
    expect(pointers(place)).toEqual(['/position']);
    const foreign = {
      lineId: other.lines[0].id,
      characteristicId: other.channels[0].characteristicId,
      gaugeId: other.channels[0].gaugeId,
    };
    for (const [field, id] of Object.entries(foreign)) {
      const refused = await post(path(), wanted({ name: 'Other', position: 'B', [field]: id }));
      expect([refused.status, pointers(refused)]).toEqual([400, [`/${field}`]]);
    }
    expectProblem(
      await post(path(), wanted({ name: 'N', position: 'B', since: '2026-03-12T00:00:00Z' })),
      400,
      'in-future',
    );
    const bad = await post(path(), { lineId: 'x', since: 'soon' });
    expect(pointers(bad)).toEqual(['/characteristicId', '/gaugeId', '/lineId', '/name', '/position', '/since']);
  });

  it('are retired with what they hold, and brought back only with it', async () => {
    const [{ id }] = (await list()).filter(({ name }) => name === 'Thickness');
    await insertPlan(app.database, plant, { ...plant.channels[1], id }, { state: 'proposed' });
    const manager = await signIn(app, 'manager@marrowby.example');
    const waiting = async () =>
      ((await app.http.get(`/api/desk?plantId=${plant.id}`).set(manager).expect(200)).body as DeskView).items.map(
        ({ group }) => group,
      );
    expect(await waiting()).toEqual(['approve']);
    await patch(`channels/${id}`, { name: 'Film thickness', isRetired: true }).expect(200);
    expect(await waiting()).toEqual([]);
    const ofLine = await app.http.get(`/api/lines/${plant.lines[1].id}/channels`).set(manager).expect(200);
    expect(ofLine.body.items).toMatchObject([{ id, retiredSince: app.clock.now().toISOString() }]);
    expect((await getLineContext(app.database, plant.lines[1].id)).channels).toEqual([]);
    expect((await list()).map(({ name, isRetired }) => [name, isRetired])).toEqual([
      ['Coat weight', false],
      ['Web thickness', false],
      ['Film thickness', true],
    ]);
    await patch(`gauges/${spareId}`, { isRetired: true }).expect(200);
    const refused = await patch(`channels/${id}`, { isRetired: false });
    expectProblem(refused, 409, 'retired-parts');
    expect((refused.body as { detail: string }).detail).toContain('gauge BG-205');
    expectProblem(await post(path(), wanted({ name: 'N', position: 'B' })), 409, 'gauge-retired');
    expectProblem(
      await post(`channels/${id}/gauges`, { gaugeId: plant.channels[1].gaugeId, since: '2026-03-10T06:00:00Z' }),
      409,
      'channel-retired',
    );
    await patch(`gauges/${spareId}`, { isRetired: false }).expect(200);
    await patch(`channels/${id}`, { isRetired: false }).expect(200);
  });

  it('change their gauge without a break while they have no readings', async () => {
    const [{ id }] = (await list()).filter(({ name }) => name === 'Film thickness');
    const changed = await post(`channels/${id}/gauges`, {
      gaugeId: plant.channels[1].gaugeId,
      since: '2026-03-02T00:00:00Z',
    });
    expect(changed.status).toBe(200);
    expect(
      (changed.body as ChannelSetUpView).gauges.map(({ assetNumber, since, until }) => [assetNumber, since, until]),
    ).toEqual([
      ['LT-118', '2026-03-02T00:00:00.000Z', null],
      ['BG-205', '2026-03-01T05:00:00.000Z', '2026-03-02T00:00:00.000Z'],
    ]);
    expect(await app.database('breaks')).toEqual([]);
    expect(await app.database('owed_jobs')).toEqual([]);
  });

  it('start their baseline afresh when another gauge serves and there are readings', async () => {
    const [channel] = plant.channels;
    const intakeId = await insertIntake(app.database, plant);
    const lot = await insertLot(app.database, plant, { number: '24100', startsAt: '2026-03-09T06:00:00Z' });
    await insertReadings(app.database, plant, { channel, lot, intakeId }, [60, 60.1, 59.9]);
    const since = '2026-03-10T06:00:00.000Z';
    const before = await app.database('channels').where({ id: channel.id }).first();
    await post(`channels/${channel.id}/gauges`, { gaugeId: spareId, since }).expect(200);
    expect(await app.database('breaks').where({ channel_id: channel.id })).toMatchObject([
      {
        at: new Date(since),
        kind: 'gauge_change',
        reason: 'BG-205 replaced BG-204.',
        declared_by: plant.people.admin.id,
      },
    ]);
    expect(await app.database('owed_jobs').where({ name: 'score-channels' })).toMatchObject([
      { state: 'owed', subject: { channelIds: [channel.id], rejudgeFrom: since } },
    ]);
    const after = await app.database('channels').where({ id: channel.id }).first();
    expect(Number(after.inputs_version)).toBe(Number(before.inputs_version) + 1);
    expect(
      (await app.database('audit_entries').orderBy('id', 'desc').limit(2)).map(({ sentence }) => sentence as string),
    ).toEqual([
      'admin declared a gauge change on Coat weight of Coater 2: BG-205 replaced BG-204.',
      'admin let gauge BG-205 serve Coat weight of Coater 2 after BG-204.',
    ]);
  });

  it('refuse the gauge that serves already, a time before it, and one ahead of now', async () => {
    const gauges = `channels/${plant.channels[0].id}/gauges`;
    const since = '2026-03-10T08:00:00Z';
    expectProblem(await post(gauges, { gaugeId: spareId, since }), 409, 'same-gauge');
    const { gaugeId } = plant.channels[0];
    const early = await post(gauges, { gaugeId, since: '2026-03-10T06:00:00Z' });
    expectProblem(early, 409, 'before-former-gauge');
    expect(pointers(early)).toEqual(['/since']);
    expectProblem(await post(gauges, { gaugeId, since: '2026-03-12T06:00:00Z' }), 400, 'in-future');
    expect(pointers(await post(gauges, { gaugeId: 0, since: '1 March' }))).toEqual(['/gaugeId', '/since']);
    expect(await app.database('channel_gauges').where({ channel_id: plant.channels[0].id })).toHaveLength(2);
  });

  it('are closed to everybody but administrators of the plant', async () => {
    const change = { gaugeId: plant.channels[0].gaugeId, since: '2026-03-10T08:00:00Z' };
    const { id } = plant.channels[0];
    for (const [headers, status, code] of [
      [as.engineer, 403, 'forbidden'],
      [as.stranger, 404, 'not-found'],
    ] as const) {
      expectProblem(await post(path(), wanted(), headers), status, code);
      expectProblem(await patch(`channels/${id}`, { name: 'x' }, headers), status, code);
      expectProblem(await post(`channels/${id}/gauges`, change, headers), status, code);
    }
    expect((await app.http.post(`/api/${path()}`).send(wanted())).status).toBe(401);
    expect((await app.http.patch(`/api/channels/${id}`).send({ name: 'x' })).status).toBe(401);
    expect((await app.http.post(`/api/channels/${id}/gauges`).send(change)).status).toBe(401);
  });
});

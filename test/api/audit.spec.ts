import type { AuditPage } from '@app/contracts';
import { type AuditEntry, insertAuditEntry } from '@app/data';
import { Workbook } from 'exceljs';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';

type Headers = { authorization: string };

describe('the audit', () => {
  let app: TestApp;
  let shift: TestShift;
  let plant: TestPlant;
  const as = {} as Record<'engineer' | 'manager' | 'lead' | 'technician' | 'director' | 'admin' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app);
    plant = shift.plant;
    const other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'manager', 'lead', 'technician', 'director', 'admin'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'admin@overdale.example');
    const { engineer, manager } = plant.people;
    await write({
      at: '2026-07-10T22:30:00Z',
      actor: engineer,
      action: 'upload',
      thingKind: 'intake',
      thingId: shift.intakeId,
    });
    await write({
      at: '2026-07-10T23:30:00Z',
      actor: { ...manager, address: '192.0.2.7' },
      action: 'release',
      thingKind: 'hold',
      thingId: shift.holds.released,
      sentence: '=manager released lot 24119: retained samples are fine.',
      before: { state: 'open', evidenceVersion: 1 },
      after: { state: 'decided', evidenceVersion: 1, decidedAt: '2026-07-10T23:30:00Z' },
    });
    await write({ plantId: other.id, actor: other.people.manager, sentence: 'manager scrapped lot 9 of Overdale.' });
    await write({
      plantId: null,
      at: '2026-07-09T00:00:00Z',
      actor: manager,
      action: 'first-sign-in',
      thingKind: 'person',
      thingId: manager.id,
    });
  });
  afterAll(() => app.close());

  const write = ({ at, ...entry }: Partial<Omit<AuditEntry, 'at'>> & { at?: string }) =>
    app.database.transaction((tx) =>
      insertAuditEntry(tx, {
        plantId: plant.id,
        at: new Date(at ?? '2026-07-10T21:00:00Z'),
        actor: null,
        action: 'hold',
        thingKind: 'hold',
        thingId: shift.holds.open,
        sentence: 'Something was done.',
        ...entry,
      }),
    );
  const get = (query = '', headers = as.manager, path = 'audit') =>
    app.http.get(`/api/plants/${plant.id}/${path}${query}`).set(headers);
  const actions = async (query: string, headers = as.manager) =>
    ((await get(query, headers).expect(200)).body as AuditPage).items.map((item) => item.action);
  const summer = '?from=2026-07-01T00:00:00Z';

  it('tells who did what to what, what changed, when and from where, newest first', async () => {
    const { body } = await get(summer).expect(200);
    expect(body).toMatchObject({ total: 2, page: 1, pageSize: 50 });
    expect(body.items[0]).toEqual({
      id: expect.any(Number),
      at: '2026-07-10T23:30:00.000Z',
      actor: { id: plant.people.manager.id, name: 'manager' },
      action: 'release',
      sentence: '=manager released lot 24119: retained samples are fine.',
      thing: { kind: 'hold', id: shift.holds.released, name: 'lot 24119' },
      changes: [
        { field: 'state', before: 'open', after: 'decided' },
        { field: 'decided at', before: null, after: '11 Jul 2026, 00:30' },
      ],
      address: '192.0.2.7',
    });
    expect(body.items[1].thing.name).toBe('coater-2-early.xlsx');
  });

  it('is filtered by person, kind, thing, action, time and words, and comes in pages', async () => {
    expect(await actions(`${summer}&person=${plant.people.engineer.id}`)).toEqual(['upload']);
    expect(await actions(`${summer}&person=0`)).toEqual([]);
    expect(await actions(`${summer}&kind=hold`)).toEqual(['release']);
    expect(await actions(`${summer}&kind=hold&thing=${shift.holds.open}`)).toEqual([]);
    expect(await actions(`${summer}&action=upload`)).toEqual(['upload']);
    expect(await actions('?from=2026-07-10T22:30:00Z&to=2026-07-10T23:30:00Z')).toEqual(['upload']);
    expect(await actions(`${summer}&text=24119`)).toEqual(['release']);
    expect(await actions(`${summer}&pageSize=1&page=2`)).toEqual(['upload']);
    expect(await actions(`${summer}&pageSize=1&page=3`)).toEqual([]);
  });

  it('shows entries of no plant to administrators alone', async () => {
    expect(await actions(summer, as.admin)).toEqual(['release', 'upload', 'first-sign-in']);
    for (const who of ['engineer', 'manager', 'director'] as const)
      expect(await actions(summer, as[who])).toEqual(['release', 'upload']);
    const stranger = await app.http.get(`/api/plants/${plant.id + 1}/audit${summer}`).set(as.stranger);
    expect((stranger.body as AuditPage).items.map((item) => item.sentence)).toEqual([
      'manager scrapped lot 9 of Overdale.',
    ]);
  });

  it('tells what there is to choose from', async () => {
    const { body } = await get('', as.manager, 'audit/filters').expect(200);
    expect(body.people).toEqual(
      expect.arrayContaining([
        { id: plant.people.engineer.id, name: 'engineer' },
        { id: plant.people.manager.id, name: 'manager' },
      ]),
    );
    expect(body.kinds).toEqual(
      expect.arrayContaining([
        { kind: 'hold', actions: ['release'] },
        { kind: 'intake', actions: ['upload'] },
      ]),
    );
  });

  it('leaves as a workbook in the plant’s time with harmless cells, which is an entry itself', async () => {
    const answer = await get(summer, as.director, 'audit/export').responseType('blob').expect(200);
    expect(answer.headers['content-disposition']).toContain('audit.xlsx');
    const book = new Workbook();
    await book.xlsx.load(answer.body as never);
    const rows = book.worksheets[0].getSheetValues().slice(1) as unknown[][];
    expect(rows[0].slice(1)).toEqual([
      'Entry',
      'Time',
      'Who',
      'What',
      'Action',
      'Kind of thing',
      'Thing',
      'Before',
      'After',
      'From where',
    ]);
    expect(rows).toHaveLength(3);
    expect(rows[1].slice(2)).toEqual([
      new Date('2026-07-11T00:30:00Z'),
      'manager',
      "'=manager released lot 24119: retained samples are fine.",
      'release',
      'hold',
      'lot 24119',
      'state: open',
      'state: decided\ndecided at: 11 Jul 2026, 00:30',
      '192.0.2.7',
    ]);
    const { body } = await get('?action=export').expect(200);
    expect(body.items).toEqual([
      expect.objectContaining({
        sentence: 'director exported 2 audit entries of Marrowby Works.',
        actor: { id: plant.people.director.id, name: 'director' },
        thing: { kind: 'plant', id: plant.id, name: 'Marrowby Works' },
        address: expect.stringMatching(/127\.0\.0\.1$/),
      }),
    ]);
  });

  it('refuses filters that say nothing', async () => {
    const pointers = async (query: string) => {
      const answer = await get(query);
      expectProblem(answer, 400, answer.body.code as string);
      return (answer.body.errors as { pointer: string }[]).map((error) => error.pointer);
    };
    expect(await pointers('?thing=5')).toEqual(['/kind']);
    expect([...new Set(await pointers('?person=x&from=yesterday&to=2026-13-01&page=0&anything=1'))].sort()).toEqual([
      '/anything',
      '/from',
      '/page',
      '/person',
      '/to',
    ]);
  });

  it('is closed to other roles, other plants and nobody', async () => {
    for (const path of ['audit', 'audit/filters', 'audit/export']) {
      expectProblem(await get('', as.lead, path), 403, 'forbidden');
      expectProblem(await get('', as.technician, path), 403, 'forbidden');
      expectProblem(await get('', as.stranger, path), 404, 'not-found');
      expect((await app.http.get(`/api/plants/${plant.id}/${path}`)).status).toBe(401);
    }
  });

  it('has no route that changes or removes an entry', async () => {
    const { body } = await app.http.get('/api/openapi.json').expect(200);
    const methods = Object.entries(body.paths as Record<string, object>)
      .filter(([path]) => path.includes('/audit'))
      .flatMap(([, operations]) => Object.keys(operations));
    expect([...new Set(methods)]).toEqual(['get']);
    for (const method of ['post', 'put', 'patch', 'delete'] as const)
      expect((await app.http[method](`/api/plants/${plant.id}/audit`).set(as.admin).send({})).status).toBe(404);
  });
});

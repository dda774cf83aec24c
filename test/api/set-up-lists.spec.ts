import type {
  CharacteristicSetUpView,
  GaugeSetUpView,
  LineSetUpView,
  Page,
  PlantSetUpView,
  ProductSetUpView,
} from '@app/contracts';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertHold } from '../support/factories/holds';
import { insertIntake, insertLot } from '../support/factories/lots';
import { insertPerson, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };

describe('the set-up of a plant', () => {
  let app: TestApp;
  let plant: TestPlant;
  const as = {} as Record<'admin' | 'manager' | 'lead' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['admin', 'manager', 'lead'] as const) as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'admin@overdale.example');
  });
  afterAll(() => app.close());

  const send = (method: 'post' | 'patch' | 'put', path: string, headers: Headers, body: object) =>
    app.http[method](`/api/${path}`).set(headers).send(body);
  const list = async <T>(what: string, headers: Headers = as.lead) =>
    ((await app.http.get(`/api/plants/${plant.id}/set-up/${what}`).set(headers).expect(200)).body as Page<T>).items;
  const pointers = (response: { body: { errors: { pointer: string }[] } }) =>
    response.body.errors.map(({ pointer }) => pointer).sort();
  const newest = () => app.database('audit_entries').orderBy('id', 'desc').first();

  /** Nobody but an administrator of this plant. */
  async function expectClosed(method: 'post' | 'patch' | 'put', path: string, body: object) {
    expectProblem(await send(method, path, as.manager, body), 403, 'forbidden');
    expectProblem(await send(method, path, as.stranger, body), 404, 'not-found');
    expect((await app.http[method](`/api/${path}`).send(body)).status).toBe(401);
  }

  it('is closed to other plants, list by list', async () => {
    for (const what of [
      '',
      '/lines',
      '/shifts',
      '/products',
      '/characteristics',
      '/specifications',
      '/gauges',
      '/channels',
    ]) {
      const path = `/api/plants/${plant.id}/set-up${what}`;
      expectProblem(await app.http.get(path).set(as.stranger), 404, 'not-found');
      expect((await app.http.get(path)).status).toBe(401);
      await app.http.get(path).set(as.lead).expect(200);
    }
  });

  describe('plants', () => {
    const path = () => `plants/${plant.id}/set-up`;

    it('are made by any administrator, who administers the new one', async () => {
      const made = await send('post', 'plants', as.admin, {
        name: ' Ardley ',
        timeZone: 'america/chicago',
        currency: 'USD',
      }).expect(201);
      expect(made.body).toMatchObject({
        name: 'Ardley',
        timeZone: 'America/Chicago',
        mayChangeTimeZone: true,
        currency: 'USD',
        engineerMayRelease: false,
        reminderManagerHours: 8,
        reminderDirectorHours: 24,
        allowanceNoticeShare: 0.1,
        allowanceCapShare: 0.25,
      });
      const { id } = made.body as PlantSetUpView;
      expect(await app.database('memberships').where({ plant_id: id })).toEqual([
        { plant_id: id, person_id: plant.people.admin.id, role: 'administrator' },
      ]);
      expect(await newest()).toMatchObject({
        plant_id: id,
        thing_kind: 'plant',
        sentence: 'admin added the plant Ardley and is its administrator.',
        after: { name: 'Ardley', timeZone: 'America/Chicago', currency: 'USD' },
      });
      await send('patch', `plants/${id}/set-up`, as.admin, { timeZone: 'Europe/Berlin' }).expect(200);
    });

    it('are made by the installation’s first administrator, who is nobody anywhere yet', async () => {
      const person = await insertPerson(app.database, { email: 'first@ardley.example' });
      const headers = await signIn(app, person.email);
      const body = { name: 'Burnside', timeZone: 'Asia/Kolkata' };
      expectProblem(await send('post', 'plants', headers, body), 403, 'forbidden');
      await app.database('person_tokens').insert({
        person_id: person.id,
        purpose: 'first_administrator',
        token_hash: Buffer.from('printed'),
        created_at: new Date('2026-03-01T00:00:00Z'),
        expires_at: new Date('2026-03-02T00:00:00Z'),
        used_at: new Date('2026-03-01T01:00:00Z'),
      });
      const made = await send('post', 'plants', headers, body).expect(201);
      expect(made.body).toMatchObject({ name: 'Burnside', timeZone: 'Asia/Kolkata', currency: null });
      const plants = await app.http.get('/api/plants').set(headers).expect(200);
      expect((plants.body as Page<{ name: string }>).items.map(({ name }) => name)).toEqual(['Burnside']);
    });

    it('are refused to others, without a name, in a zone that is none, and by a name that is taken', async () => {
      const body = { name: 'Fenwick', timeZone: 'Europe/London' };
      expectProblem(await send('post', 'plants', as.manager, body), 403, 'forbidden');
      expect((await app.http.post('/api/plants').send(body)).status).toBe(401);
      const bad = await send('post', 'plants', as.admin, { name: ' ', timeZone: 7, currency: 'euro' });
      expectProblem(bad, 400, 'invalid-input');
      expect([...new Set(pointers(bad))]).toEqual(['/currency', '/name', '/timeZone']);
      for (const timeZone of ['Europe/Nowhere', '+01:00', 'posix/Europe/London'])
        expectProblem(await send('post', 'plants', as.admin, { ...body, timeZone }), 400, 'unknown-zone');
      const taken = await send('post', 'plants', as.admin, { ...body, name: 'Overdale' });
      expectProblem(taken, 409, 'name-taken');
      expect(pointers(taken)).toEqual(['/name']);
    });

    it('have allowances and reminder times of their own', async () => {
      const changes = { reminderManagerHours: 6, reminderDirectorHours: 12, allowanceCapShare: 0.3, currency: 'GBP' };
      const changed = await send('patch', path(), as.admin, changes).expect(200);
      expect(changed.body).toMatchObject({ ...changes, allowanceNoticeShare: 0.1, name: 'Marrowby Works' });
      expect(await newest()).toMatchObject({
        action: 'change',
        before: { reminderManagerHours: 8, reminderDirectorHours: 24, allowanceCapShare: 0.25, currency: null },
        after: changes,
        sentence: expect.stringContaining('currency from none to GBP'),
      });
      const count = async () => Number((await app.database('audit_entries').count())[0].count);
      const before = await count();
      await send('patch', path(), as.admin, changes).expect(200);
      expect(await count()).toBe(before);
    });

    it('remind managers before directors and tell a movement before lots are not scored', async () => {
      const early = await send('patch', path(), as.admin, { reminderDirectorHours: 2 });
      expectProblem(early, 400, 'directors-before-managers');
      expect(pointers(early)).toEqual(['/reminderDirectorHours']);
      const low = await send('patch', path(), as.admin, { allowanceNoticeShare: 0.5 });
      expectProblem(low, 400, 'cap-below-notice');
      const bad = await send('patch', path(), as.admin, {
        name: null,
        reminderManagerHours: 0,
        allowanceCapShare: 1.5,
        engineerMayRelease: 'perhaps',
        colour: 'red',
      });
      expect([...new Set(pointers(bad))]).toEqual([
        '/allowanceCapShare',
        '/colour',
        '/engineerMayRelease',
        '/name',
        '/reminderManagerHours',
      ]);
    });

    it('are closed to everybody but their administrators', () => expectClosed('patch', path(), { name: 'Mine' }));

    it('keep their zone once a workbook was read in it', async () => {
      const intakeId = await insertIntake(app.database, plant);
      const refused = await send('patch', path(), as.admin, { timeZone: 'Europe/Paris' });
      expectProblem(refused, 409, 'zone-in-use');
      expect(pointers(refused)).toEqual(['/timeZone']);
      await app.database('intakes').where({ id: intakeId }).delete();
    });
  });

  describe('lines', () => {
    it('are added, renamed, retired and brought back', async () => {
      const path = `plants/${plant.id}/set-up/lines`;
      const { body } = await send('post', path, as.admin, { name: 'Slurry 3' }).expect(201);
      const { id } = body as LineSetUpView;
      expect(body).toEqual({ id, name: 'Slurry 3', channelCount: 0, isRetired: false });
      expect((await send('patch', `lines/${id}`, as.admin, { name: 'Slurry 4' })).body).toMatchObject({
        name: 'Slurry 4',
      });
      expect(await newest()).toMatchObject({
        thing_kind: 'line',
        thing_id: id,
        sentence: 'admin changed line Slurry 3: name from Slurry 3 to Slurry 4.',
        before: { name: 'Slurry 3' },
        after: { name: 'Slurry 4' },
        address: expect.stringContaining('127.0.0.1'),
      });
      await send('patch', `lines/${id}`, as.admin, { isRetired: true }).expect(200);
      expect((await list<LineSetUpView>('lines')).map(({ name, isRetired }) => [name, isRetired])).toEqual([
        ['Calender 1', false],
        ['Coater 2', false],
        ['Slurry 4', true],
      ]);
      const shown = await app.http.get(`/api/plants/${plant.id}/lines`).set(as.lead).expect(200);
      expect((shown.body as Page<{ name: string }>).items.map(({ name }) => name)).toEqual(['Calender 1', 'Coater 2']);
      const upload = await app.http
        .post(`/api/lines/${id}/intakes`)
        .set(as.manager)
        .attach('file', Buffer.from('PK\x03\x04'), 'slurry.xlsx');
      expectProblem(upload, 409, 'line-retired');
      await send('patch', `lines/${id}`, as.admin, { isRetired: false }).expect(200);
      expect(await newest()).toMatchObject({ sentence: 'admin brought line Slurry 4 back into use.' });
    });

    it('have a name each, and cannot be retired with channels on them', async () => {
      const taken = await send('post', `plants/${plant.id}/set-up/lines`, as.admin, { name: 'Coater 2' });
      expectProblem(taken, 409, 'name-taken');
      expect(pointers(taken)).toEqual(['/name']);
      expectProblem(
        await send('post', `plants/${plant.id}/set-up/lines`, as.admin, { name: '' }),
        400,
        'invalid-input',
      );
      const { id } = plant.lines[0];
      const refused = await send('patch', `lines/${id}`, as.admin, { isRetired: true });
      expectProblem(refused, 409, 'line-in-use');
      expect((refused.body as { detail: string }).detail).toBe(
        'Coater 2 has 2 channels in use. Retire its channels first.',
      );
      expectProblem(await send('patch', 'lines/999999', as.admin, { name: 'x' }), 404, 'not-found');
    });

    it('are closed to everybody but administrators', async () => {
      await expectClosed('post', `plants/${plant.id}/set-up/lines`, { name: 'x' });
      await expectClosed('patch', `lines/${plant.lines[1].id}`, { name: 'x' });
    });
  });

  describe('products', () => {
    const path = () => `plants/${plant.id}/set-up/products`;

    it('are added with what a unit is worth, changed and retired', async () => {
      const { body } = await send('post', path(), as.admin, {
        code: 'SEP-20',
        name: 'Separator 20',
        valuePerUnit: 3.5,
      });
      const { id } = body as ProductSetUpView;
      expect(body).toEqual({ id, code: 'SEP-20', name: 'Separator 20', valuePerUnit: 3.5, isRetired: false });
      await send('patch', `products/${id}`, as.admin, { valuePerUnit: null, isRetired: true }).expect(200);
      expect(await newest()).toMatchObject({
        sentence: 'admin changed product SEP-20: retired, value of one unit from 3.5 to none.',
        before: { valuePerUnit: 3.5, isRetired: false },
        after: { valuePerUnit: null, isRetired: true },
      });
      expect((await list<ProductSetUpView>('products')).map(({ code }) => code)).toEqual(['SEP-16', 'SEP-20']);
    });

    it('have a code each; a value is above 0', async () => {
      const taken = await send('post', path(), as.admin, { code: 'SEP-16', name: 'Again' });
      expectProblem(taken, 409, 'code-taken');
      expect(pointers(taken)).toEqual(['/code']);
      const bad = await send('post', path(), as.admin, { code: '', valuePerUnit: -1 });
      expect([...new Set(pointers(bad))]).toEqual(['/code', '/name', '/valuePerUnit']);
    });

    it('are not retired while a lot of them is held', async () => {
      const lot = await insertLot(app.database, plant, { number: '24900', startsAt: '2026-03-11T06:00:00Z' });
      const id = await insertHold(app.database, plant, { lot, causes: [] });
      const refused = await send('patch', `products/${plant.productId}`, as.admin, { isRetired: true });
      expectProblem(refused, 409, 'product-in-use');
      expect((refused.body as { detail: string }).detail).toContain('1 lot of it is held');
      await app.database('holds').where({ id }).delete();
    });

    it('are closed to everybody but administrators', async () => {
      await expectClosed('post', path(), { code: 'x', name: 'x' });
      await expectClosed('patch', `products/${plant.productId}`, { name: 'x' });
    });
  });

  describe('characteristics', () => {
    const path = () => `plants/${plant.id}/set-up/characteristics`;

    it('are added, also without a unit, and change it until something is stated in it', async () => {
      const { body } = await send('post', path(), as.admin, { name: 'pH', unit: '', resolution: 0.01 }).expect(201);
      const { id } = body as CharacteristicSetUpView;
      expect(body).toEqual({ id, name: 'pH', unit: '', resolution: 0.01, mayChangeUnit: true, isRetired: false });
      await send('patch', `characteristics/${id}`, as.admin, { unit: 'mV', resolution: 1 }).expect(200);
      const refused = await send('patch', `characteristics/${plant.channels[0].characteristicId}`, as.admin, {
        unit: 'kg',
      });
      expectProblem(refused, 409, 'unit-in-use');
      expect(pointers(refused)).toEqual(['/unit']);
      await send('patch', `characteristics/${id}`, as.admin, { isRetired: true }).expect(200);
      const items = await list<CharacteristicSetUpView>('characteristics');
      expect(items.map(({ name, mayChangeUnit, isRetired }) => [name, mayChangeUnit, isRetired])).toEqual([
        ['Coat weight', false, false],
        ['Web thickness', false, false],
        ['pH', true, true],
      ]);
    });

    it('have a name each, a resolution above 0, and stay while a channel measures them', async () => {
      const taken = await send('post', path(), as.admin, { name: 'Coat weight', unit: 'g', resolution: 1 });
      expectProblem(taken, 409, 'name-taken');
      const bad = await send('post', path(), as.admin, { name: 'x', resolution: 0 });
      expect([...new Set(pointers(bad))]).toEqual(['/resolution', '/unit']);
      const id = plant.channels[0].characteristicId;
      const refused = await send('patch', `characteristics/${id}`, as.admin, { isRetired: true });
      expectProblem(refused, 409, 'characteristic-in-use');
    });

    it('are closed to everybody but administrators', async () => {
      await expectClosed('post', path(), { name: 'x', unit: 'x', resolution: 1 });
      await expectClosed('patch', `characteristics/${plant.channels[0].characteristicId}`, { name: 'x' });
    });
  });

  describe('gauges', () => {
    const path = () => `plants/${plant.id}/set-up/gauges`;

    it('are added, changed, and say what they serve', async () => {
      const { body } = await send('post', path(), as.admin, { assetNumber: 'BG-300', kind: 'beta gauge' }).expect(201);
      const { id } = body as GaugeSetUpView;
      await send('patch', `gauges/${id}`, as.admin, { kind: 'X-ray gauge' }).expect(200);
      expect(await list<GaugeSetUpView>('gauges')).toEqual([
        {
          id: plant.channels[0].gaugeId,
          assetNumber: 'BG-204',
          kind: 'beta gauge',
          serves: [
            {
              channelId: plant.channels[0].id,
              channelName: 'Coat weight',
              lineName: 'Coater 2',
              since: '2020-01-01T00:00:00.000Z',
            },
          ],
          isRetired: false,
        },
        { id, assetNumber: 'BG-300', kind: 'X-ray gauge', serves: [], isRetired: false },
        expect.objectContaining({ assetNumber: 'LT-118' }),
      ]);
    });

    it('have an asset number each, and are not retired while they serve', async () => {
      const taken = await send('post', path(), as.admin, { assetNumber: 'BG-204', kind: 'x' });
      expectProblem(taken, 409, 'asset-number-taken');
      expect(pointers(taken)).toEqual(['/assetNumber']);
      expect([...new Set(pointers(await send('post', path(), as.admin, { kind: 3 })))]).toEqual([
        '/assetNumber',
        '/kind',
      ]);
      const refused = await send('patch', `gauges/${plant.channels[0].gaugeId}`, as.admin, { isRetired: true });
      expectProblem(refused, 409, 'gauge-in-use');
      expect((refused.body as { detail: string }).detail).toContain('BG-204 serves Coat weight of Coater 2.');
    });

    it('are closed to everybody but administrators', async () => {
      await expectClosed('post', path(), { assetNumber: 'x', kind: 'x' });
      await expectClosed('patch', `gauges/${plant.channels[0].gaugeId}`, { kind: 'x' });
    });
  });

  it('lets somebody administer one plant and none of the others', async () => {
    await insertPerson(app.database, { email: 'both@marrowby.example', plantId: plant.id, roles: ['director'] });
    const headers = await signIn(app, 'both@marrowby.example');
    expectProblem(await send('post', 'plants', headers, { name: 'Third', timeZone: 'UTC' }), 403, 'forbidden');
  });
});

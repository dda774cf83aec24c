import type { Page, SpecificationSetUpView } from '@app/contracts';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };

describe('specifications', () => {
  let app: TestApp;
  let plant: TestPlant;
  let other: TestPlant;
  const as = {} as Record<'admin' | 'engineer' | 'manager' | 'lead' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['admin', 'engineer', 'manager', 'lead'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'manager@overdale.example');
  });
  afterAll(() => app.close());

  const post = (path: string, headers: Headers, body?: object) => app.http.post(`/api/${path}`).set(headers).send(body);
  const wanted = (changed: object = {}) => ({
    productId: plant.productId,
    characteristicId: plant.channels[0].characteristicId,
    nominal: 60,
    lower: 59.5,
    upper: 60.5,
    appliesToIndividuals: true,
    validFrom: '2026-03-10T00:00:00Z',
    reason: 'The customer asks for less scatter.',
    ...changed,
  });
  const propose = (changed: object = {}, headers = as.engineer) =>
    post(`plants/${plant.id}/set-up/specification-proposals`, headers, wanted(changed));
  const proposed = async (changed: object = {}, headers = as.engineer) => {
    const { body } = await propose(changed, headers).expect(201);
    return (body as SpecificationSetUpView).proposal!.id;
  };
  const list = async (headers = as.lead) =>
    (
      (await app.http.get(`/api/plants/${plant.id}/set-up/specifications`).set(headers).expect(200))
        .body as Page<SpecificationSetUpView>
    ).items;
  const pointers = (response: { body: { errors: { pointer: string }[] } }) =>
    [...new Set(response.body.errors.map(({ pointer }) => pointer))].sort();
  const newest = () => app.database('audit_entries').orderBy('id', 'desc').first();
  const withdraw = (id: number, headers: Headers) => post(`specification-proposals/${id}/withdrawal`, headers);
  const approve = (id: number, headers: Headers, password = PASSWORD) =>
    post(`specification-proposals/${id}/approval`, headers, { password });

  it('are listed with their versions and what waits, and say who may do what', async () => {
    const id = await proposed({}, as.manager);
    const [coatWeight, thickness] = await list();
    expect(coatWeight).toEqual({
      product: { id: plant.productId, code: 'SEP-16', name: 'Separator 16' },
      characteristic: { id: plant.channels[0].characteristicId, name: 'Coat weight', unit: 'g/m²', resolution: 0.01 },
      versions: [
        {
          id: plant.channels[0].specificationId,
          version: 1,
          nominal: 60,
          lower: 58.8,
          upper: 61.2,
          appliesToIndividuals: true,
          validFrom: '2020-01-01T00:00:00.000Z',
          until: null,
          proposedBy: 'engineer',
          approvedBy: 'manager',
          approvedAt: '2020-01-01T00:00:00.000Z',
        },
      ],
      proposal: {
        id,
        nominal: 60,
        lower: 59.5,
        upper: 60.5,
        appliesToIndividuals: true,
        validFrom: '2026-03-10T00:00:00.000Z',
        reason: 'The customer asks for less scatter.',
        proposedBy: 'manager',
        proposedAt: '2026-03-11T12:00:00.000Z',
        mayApprove: false,
        whyNot: 'A quality manager approves specifications.',
        mayWithdraw: false,
      },
    });
    expect(thickness).toMatchObject({ characteristic: { name: 'Web thickness' }, proposal: null });
    expect((await list(as.manager))[0].proposal).toMatchObject({
      mayApprove: false,
      whyNot: 'You proposed this specification: somebody else approves it.',
      mayWithdraw: true,
    });
    expectProblem(await approve(id, as.manager), 403, 'own-proposal');
    expectProblem(await withdraw(id, as.engineer), 403, 'not-own-proposal');
    expectProblem(await withdraw(id, as.lead), 403, 'forbidden');
    expectProblem(await withdraw(id, as.stranger), 404, 'not-found');
    const withdrawn = await withdraw(id, as.manager).expect(200);
    expect(withdrawn.body).toMatchObject({ proposal: null, versions: [{ version: 1 }] });
    expectProblem(await withdraw(id, as.manager), 409, 'not-pending');
    expectProblem(await approve(id, as.manager), 409, 'not-approvable');
  });

  it('of a product that has none are withdrawn without a trace in the list', async () => {
    const code = 'SEP-99';
    const added = await post(`plants/${plant.id}/set-up/products`, as.admin, { code, name: code }).expect(201);
    const productId = (added.body as { id: number }).id;
    const id = await proposed({ productId }, as.admin);
    expect((await list()).map(({ product, versions }) => [product.code, versions.length])).toContainEqual([code, 0]);
    const retired = await app.http.patch(`/api/products/${productId}`).set(as.admin).send({ isRetired: true });
    expectProblem(retired, 409, 'product-in-use');
    expect((await withdraw(id, as.admin).expect(200)).body).toMatchObject({ versions: [], proposal: null });
    expect((await list()).map(({ product }) => product.code)).not.toContain(code);
    await app.http.patch(`/api/products/${productId}`).set(as.admin).send({ isRetired: true }).expect(200);
    expectProblem(await propose({ productId }), 409, 'product-retired');
  });

  it('refuse what does not fit, each at its field', async () => {
    const at = async (changed: object) => {
      const response = await propose(changed);
      return [response.status, (response.body as { code: string }).code, pointers(response)];
    };
    expect(await at({ lower: null, upper: null })).toEqual([400, 'limits-missing', ['/lower']]);
    expect(await at({ lower: 61, upper: 60 })).toEqual([400, 'limits-swapped', ['/upper']]);
    expect(await at({ nominal: 62 })).toEqual([400, 'nominal-outside', ['/nominal']]);
    expect(await at({ productId: other.productId })).toEqual([400, 'unknown-product', ['/productId']]);
    expect(await at({ characteristicId: 9_999_999 })).toEqual([400, 'unknown-characteristic', ['/characteristicId']]);
    expect(await at({ validFrom: '2020-01-01T00:00:00Z' })).toEqual([409, 'before-newest-version', ['/validFrom']]);
    const bad = await post(`plants/${plant.id}/set-up/specification-proposals`, as.engineer, {
      nominal: 'sixty',
      reason: ' ',
    });
    expect(pointers(bad)).toEqual([
      '/appliesToIndividuals',
      '/characteristicId',
      '/lower',
      '/nominal',
      '/productId',
      '/reason',
      '/upper',
      '/validFrom',
    ]);
    expectProblem(await propose({}, as.lead), 403, 'forbidden');
    expectProblem(await propose({}, as.stranger), 404, 'not-found');
  });

  describe('when approved', () => {
    let lotIds: number[];
    beforeAll(async () => {
      const [channel] = plant.channels;
      await insertPlan(app.database, plant, channel);
      const intakeId = await insertIntake(app.database, plant);
      const starts = ['2026-03-09T06:00:00Z', '2026-03-10T00:00:00Z', '2026-03-10T06:00:00Z'];
      lotIds = [];
      for (const [index, startsAt] of starts.entries()) {
        const lot = await insertLot(app.database, plant, { number: String(24200 + index), startsAt });
        await insertReadings(app.database, plant, { channel, lot, intakeId }, [59.2, 60, 60.4, 60.6, 61]);
        lotIds.push(lot.id);
      }
    });

    it('are signed, hold from their time on, and lots made since are judged with them', async () => {
      const id = await proposed();
      const pending = await propose();
      expectProblem(pending, 409, 'proposal-pending');
      const inputsVersion = async () =>
        Number((await app.database('channels').where({ id: plant.channels[0].id }).first()).inputs_version);
      const before = await inputsVersion();
      expectProblem(await approve(id, as.engineer), 403, 'forbidden');
      expectProblem(await approve(id, as.admin), 403, 'forbidden');
      expectProblem(await approve(id, as.stranger), 404, 'not-found');
      expectProblem(await approve(id, as.manager, 'not mine'), 400, 'wrong-password');
      expect(pointers(await approve(id, as.manager, ''))).toEqual(['/password']);
      const { body } = await approve(id, as.manager).expect(200);
      expect((body as SpecificationSetUpView).versions).toMatchObject([
        {
          version: 2,
          lower: 59.5,
          upper: 60.5,
          validFrom: '2026-03-10T00:00:00.000Z',
          until: null,
          proposedBy: 'engineer',
          approvedBy: 'manager',
        },
        { version: 1, until: '2026-03-10T00:00:00.000Z' },
      ]);
      expect((body as SpecificationSetUpView).proposal).toBeNull();
      expect(await newest()).toMatchObject({
        action: 'approve',
        thing_kind: 'specification_proposal',
        thing_id: id,
        sentence:
          'manager approved version 2 of Coat weight of SEP-16: 60 g/m², 59.5 to 60.5 g/m², proposed by engineer.',
        before: { version: 1, nominal: 60, lower: 58.8, upper: 61.2, appliesToIndividuals: true },
        after: { version: 2, lower: 59.5, signature: { name: 'manager', meaning: 'approved' } },
      });
      const lots = await app.database('lot_channels').whereIn('lot_id', lotIds).orderBy('lot_id');
      const [version1, version2] = [plant.channels[0].specificationId, (body as SpecificationSetUpView).versions[0].id];
      expect(
        lots.map((lot: Record<string, number>) => [lot.specification_id, lot.count_below, lot.count_above]),
      ).toEqual([
        [version1, 0, 0],
        // Of 59.2, 60, 60.4, 60.6 and 61 one lies below 59.5 and two above 60.5.
        [version2, 1, 2],
        [version2, 1, 2],
      ]);
      expect(await inputsVersion()).toBe(before + 1);
      // The plan's baseline reaches 48 h to either side.
      expect(await app.database('owed_jobs').where({ name: 'score-channels' })).toMatchObject([
        { subject: { channelIds: [plant.channels[0].id], rejudgeFrom: '2026-03-08T00:00:00.000Z' } },
      ]);
      expectProblem(await approve(id, as.manager), 409, 'not-approvable');
    });

    it('from a later time on change nothing of the lots that are there', async () => {
      const owed = await app.database('owed_jobs').count();
      const id = await proposed({ validFrom: '2026-05-01T00:00:00Z', lower: null });
      await approve(id, as.manager).expect(200);
      expect(await app.database('owed_jobs').count()).toEqual(owed);
      expect((await list())[0].versions.map(({ version, lower, until }) => [version, lower, until])).toEqual([
        [3, null, null],
        [2, 59.5, '2026-05-01T00:00:00.000Z'],
        [1, 58.8, '2026-03-10T00:00:00.000Z'],
      ]);
      expectProblem(await propose({ validFrom: '2026-04-01T00:00:00Z' }), 409, 'before-newest-version');
    });
  });
});

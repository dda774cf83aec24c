import type { IntakeView } from '@app/contracts';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { longWorkbook, scatter, type WorkbookLot } from '../support/shift-workbook';

type Headers = { authorization: string };

describe('workbooks that repeat, correct or take back', () => {
  let app: TestApp;
  let plant: TestPlant;
  const as = {} as Record<'engineer' | 'engineer2' | 'lead' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    await insertPlan(app.database, plant, plant.channels[0]);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'engineer2', 'lead'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'engineer@overdale.example');
  });
  afterAll(() => app.close());

  const lots: WorkbookLot[] = Array.from({ length: 12 }, (_, index) => ({
    number: String(24001 + index),
    startsAt: new Date(Date.UTC(2026, 2, 9) + index * 7_200_000).toISOString(),
    values: scatter(60, 6, 0.3, index + 1),
  }));
  const upload = async (bytes: Buffer, headers = as.engineer) =>
    (
      await app.http
        .post(`/api/lines/${plant.lines[0].id}/intakes`)
        .set(headers)
        .attach('file', bytes, 'coater 2.xlsx')
        .expect(201)
    ).body as IntakeView;
  const confirm = (id: number, body: object = {}) =>
    app.http.post(`/api/intakes/${id}/confirm`).set(as.engineer).send(body);
  const withdraw = (id: number, headers = as.engineer, reason = 'The wrong shift.') =>
    app.http.post(`/api/intakes/${id}/withdraw`).set(headers).send({ reason });
  async function until(id: number, state: string): Promise<IntakeView> {
    const end = Date.now() + 60_000;
    for (;;) {
      const intake = (await app.http.get(`/api/intakes/${id}`).set(as.lead).expect(200)).body as IntakeView;
      if (intake.state === state) return intake;
      if (Date.now() > end) throw new Error(`${intake.state}, not ${state}: ${intake.failure}`);
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
  const inForce = async () => {
    const { rows } = await app.database.raw<{ rows: { count: number; sum: number }[] }>(
      'select count(*)::int as count, sum(value)::float8 as sum from readings where superseded_by is null and withdrawn_at is null',
    );
    return rows[0];
  };

  it('say before confirming what is there, and what has another value', async () => {
    const first = await upload(await longWorkbook(lots.slice(0, 10)));
    expect(first.comparison).toMatchObject({
      readingsNew: 60,
      readingsAlreadyThere: 0,
      readingsDiffering: 0,
      overlaps: [],
    });
    await confirm(first.id).expect(200);
    await until(first.id, 'scored');
    const corrected = structuredClone(lots);
    const wrong = corrected[3].values[2];
    corrected[3].values[2] = 61.5;
    const second = await upload(await longWorkbook(corrected), as.engineer2);
    expect(second.comparison).toMatchObject({
      readingsNew: 12,
      readingsAlreadyThere: 59,
      readingsDiffering: 1,
      rowsNew: 12,
      rowsAlreadyThere: 59,
      rowsDiffering: 1,
      rowsNotUsed: 0,
    });
    expect(second.comparison?.differing).toEqual([
      expect.objectContaining({ lot: '24004', channelName: 'Coat weight', stored: wrong, incoming: 61.5, row: 22 }),
    ]);
    expect(second.comparison?.overlaps).toEqual([
      expect.objectContaining({ intakeId: first.id, receivedBy: 'engineer', lots: expect.arrayContaining(['24004']) }),
    ]);
    const before = await inForce();
    await confirm(second.id, { differing: 'supersede' }).expect(200);
    const scored = await until(second.id, 'scored');
    expect(scored).toMatchObject({
      rowsUsed: 12,
      rowsSuperseding: 1,
      rowsAlreadyThere: 59,
      rowsNotUsed: 0,
      rowsRead: 72,
    });
    const after = await inForce();
    expect(after.count).toBe(before.count + 12);
    const added = lots
      .slice(10)
      .flatMap(({ values }) => values)
      .reduce((sum, value) => sum + value, 0);
    expect(after.sum).toBeCloseTo(before.sum + added + 61.5 - wrong, 6);
    expect(await app.database('readings').whereNotNull('superseded_by')).toHaveLength(1);
  });

  it('can be withdrawn with a reason, which puts back what was', async () => {
    const before = await inForce();
    const late = lots.map((lot) => ({
      ...lot,
      number: `9${lot.number}`,
      startsAt: new Date(Date.parse(lot.startsAt) + 86_400_000).toISOString(),
    }));
    const third = await upload(await longWorkbook(late.slice(0, 3)));
    await confirm(third.id).expect(200);
    await until(third.id, 'scored');
    expect((await inForce()).count).toBe(before.count + 18);
    expectProblem(await withdraw(third.id, as.lead), 403, 'forbidden');
    expectProblem(await withdraw(third.id, as.stranger), 404, 'not-found');
    expectProblem(await withdraw(third.id, as.engineer, ' '), 400, 'invalid-input');
    const withdrawn = (await withdraw(third.id, as.engineer2).expect(200)).body as IntakeView;
    expect(withdrawn).toMatchObject({
      state: 'withdrawn',
      isWithdrawable: false,
      withdrawal: { by: 'engineer2', reason: 'The wrong shift.' },
    });
    expect(await inForce()).toEqual(before);
    expectProblem(await withdraw(third.id), 409, 'withdrawn-already');
    const { body } = await app.http.get(`/api/lots?lineId=${plant.lines[0].id}&pageSize=100`).set(as.lead).expect(200);
    expect((body.items as { number: string }[]).filter(({ number }) => number.startsWith('9'))).toEqual([]);
  });

  it('list no settled verdict where none would change, and have nothing to judge again then', async () => {
    const fourth = await upload(await longWorkbook(lots));
    expect((await app.http.get(`/api/intakes/${fourth.id}/settled`).set(as.lead).expect(200)).body).toEqual([]);
    expect((await app.http.post(`/api/intakes/${fourth.id}/settled`).set(as.engineer).expect(200)).body).toEqual([]);
    expectProblem(await app.http.post(`/api/intakes/${fourth.id}/settled`).set(as.lead), 403, 'forbidden');
    expectProblem(await app.http.get(`/api/intakes/${fourth.id}/settled`).set(as.stranger), 404, 'not-found');
  });
});

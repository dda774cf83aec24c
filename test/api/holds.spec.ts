import { NO_GAUGE_CHECKS } from '@app/contracts';
import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { insertHold } from '../support/factories/holds';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { signIn } from '../support/factories/people';
import { insertPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';
import { insertFit, insertVerdict } from '../support/factories/verdicts';

type Headers = { authorization: string };

describe('holds', () => {
  let app: TestApp;
  let shift: TestShift;
  const as = {} as Record<'manager' | 'engineer' | 'engineer2' | 'lead' | 'director' | 'stranger', Headers>;
  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['manager', 'engineer', 'engineer2', 'lead', 'director'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'manager@overdale.example');
  });
  afterAll(() => app.close());

  const get = (path: string, headers: Headers = as.manager) => app.http.get(`/api${path}`).set(headers);
  const ids = async (query: string, headers?: Headers) =>
    ((await get(`/holds?${query}`, headers).expect(200)).body.items as { id: number }[]).map((hold) => hold.id);
  const mayDecide = async (headers: Headers, id = shift.holds.open) =>
    (await get(`/holds/${id}`, headers).expect(200)).body.mayDecide as { dispositions: string[]; why: string | null };

  it('are listed by state, the open ones oldest first', async () => {
    const { open, released, scrapped } = shift.holds;
    expect(await ids('status=open')).toEqual([open]);
    expect(await ids('status=decided')).toEqual([scrapped, released]);
    expect(await ids('')).toEqual([scrapped, released, open]);
    expect(await ids('pageSize=1&page=2')).toEqual([released]);
    expect(await ids(`lineId=${shift.plant.lines[1].id}`)).toEqual([]);
  });

  it('are listed with causes and decision', async () => {
    const { body } = await get('/holds?status=decided').expect(200);
    expect(body).toMatchObject({ total: 2, page: 1, pageSize: 50 });
    expect(body.items[1]).toEqual({
      id: shift.holds.released,
      state: 'decided',
      lot: { id: shift.lots['24119'].id, number: '24119' },
      line: { id: shift.plant.lines[0].id, name: 'Coater 2' },
      product: 'SEP-16',
      openedAt: '2026-03-11T08:49:00.000Z',
      reminders: [],
      isLate: false,
      causes: [
        {
          channel: { id: shift.plant.channels[0].id, name: 'Coat weight' },
          signal: 'lot_mean',
          sentence: 'lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ)',
        },
      ],
      isSetAside: false,
      decision: {
        disposition: 'release',
        reason: 'measured again by hand',
        note: null,
        by: 'manager',
        at: '2026-03-11T10:00:00.000Z',
        meaning: 'released',
      },
    });
    expect(body.items[0]).toMatchObject({ isSetAside: true });
  });

  it('are shown with reason, evidence and what was decided of similar ones', async () => {
    const { body } = await get(`/holds/${shift.holds.open}`).expect(200);
    expect(body).toMatchObject({
      state: 'open',
      plantId: shift.plant.id,
      quantity: 500,
      quantityUnit: 'm',
      reason: 'Lot 24118 lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ).',
      attribution: NO_GAUGE_CHECKS,
      setAside: null,
      evidenceVersion: 1,
      decision: null,
      maySetAside: true,
      history: [],
    });
    expect(body.verdicts).toHaveLength(1);
    expect(body.similar).toEqual([
      expect.objectContaining({ holdId: shift.holds.scrapped, lotNumber: '24121', disposition: 'scrap' }),
      expect.objectContaining({
        holdId: shift.holds.released,
        lotNumber: '24119',
        disposition: 'release',
        decidedAt: '2026-03-11T10:00:00.000Z',
      }),
    ]);
  });

  it('tell who set the lot aside, and let nobody do it twice', async () => {
    const { body } = await get(`/holds/${shift.holds.scrapped}`).expect(200);
    expect(body.setAside).toEqual({ by: 'lead', at: '2026-03-11T09:00:00.000Z', place: 'bay 7' });
    expect(body.maySetAside).toBe(false);
  });

  it('say what each person may decide, and why not', async () => {
    expect(await mayDecide(as.manager)).toEqual({ dispositions: ['release', 'scrap'], why: null });
    expect((await mayDecide(as.manager, shift.holds.released)).dispositions).toEqual([]);
    for (const who of [as.engineer, as.engineer2, as.lead, as.director]) {
      const { dispositions, why } = await mayDecide(who);
      expect(dispositions).toEqual([]);
      expect(why).toMatch(/quality manager/i);
    }
    await app.database('plants').where({ id: shift.plant.id }).update({ engineer_may_release: true });
    expect(await mayDecide(as.engineer2)).toEqual({ dispositions: ['release'], why: null });
    const own = await mayDecide(as.engineer);
    expect(own.dispositions).toEqual([]);
    expect(own.why).toContain('You confirmed');
    expect((await mayDecide(as.lead)).dispositions).toEqual([]);
  });

  it('let an engineer release nothing that goes beyond control limits, and a manager nothing of an own intake', async () => {
    const db = app.database;
    const { plant } = shift;
    const channel = plant.channels[1];
    const lot = await insertLot(db, plant, { number: '24122', startsAt: '2026-03-11T10:30:00Z' });
    const intakeId = await insertIntake(db, plant, { confirmedBy: plant.people.manager.id });
    await insertReadings(db, plant, { channel, lot, intakeId }, [26.1, 26.2]);
    const fitId = await insertFit(db, plant, channel.id);
    const verdictId = await insertVerdict(db, plant, { channel, lot }, { fitId, score: 9 });
    const causes = [{ channel, verdictId, intakeId, signal: 'outside_specification' as const }];
    const holdId = await insertHold(db, plant, { lot, causes });
    expect((await mayDecide(as.engineer2, holdId)).dispositions).toEqual([]);
    const { dispositions, why } = await mayDecide(as.manager, holdId);
    expect(dispositions).toEqual([]);
    expect(why).toContain('You confirmed');
  });

  it('may be set aside by those whose word it is', async () => {
    const may = async (headers: Headers) =>
      (await get(`/holds/${shift.holds.open}`, headers)).body.maySetAside as boolean;
    expect([await may(as.lead), await may(as.engineer), await may(as.director)]).toEqual([true, true, false]);
  });

  it('of another plant answer as if they were not there', async () => {
    expect(await ids('', as.stranger)).toEqual([]);
    expectProblem(await get(`/holds/${shift.holds.open}`, as.stranger), 404, 'not-found');
    expectProblem(await get(`/holds?plantId=${shift.plant.id}`, as.stranger), 404, 'not-found');
    expectProblem(await get('/holds/999999'), 404, 'not-found');
  });

  it('need a sign-in, and a state that there is', async () => {
    expectProblem(await app.http.get('/api/holds'), 401, 'not-signed-in');
    expectProblem(await app.http.get('/api/holds/1'), 401, 'not-signed-in');
    const response = await get('/holds?status=closed');
    expectProblem(response, 400, 'invalid-input');
    expect(response.body.errors[0].pointer).toBe('/status');
  });
});

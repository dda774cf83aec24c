import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertHold } from '../support/factories/holds';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';
import { insertFit, insertVerdict } from '../support/factories/verdicts';

type Headers = { authorization: string };

describe('decisions', () => {
  let app: TestApp;
  let shift: TestShift;
  let next = 24200;
  const as = {} as Record<
    'manager' | 'engineer' | 'engineer2' | 'lead' | 'technician' | 'director' | 'stranger',
    Headers
  >;

  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app, { engineerMayRelease: true });
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['manager', 'engineer', 'engineer2', 'lead', 'technician', 'director'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'manager@overdale.example');
  });
  afterAll(() => app.close());

  /** Another open hold on coat weight. */
  async function openHold(
    options: { confirmedBy?: number; signal?: 'lot_mean' | 'outside_specification' } = {},
  ): Promise<number> {
    const { plant } = shift;
    const channel = plant.channels[0];
    const intakeId = await insertIntake(app.database, plant, { confirmedBy: options.confirmedBy });
    const lot = await insertLot(app.database, plant, { number: String(next++), startsAt: '2026-03-11T09:00:00Z' });
    await insertReadings(app.database, plant, { channel, lot, intakeId }, [60, 60.1]);
    const fitId = await insertFit(app.database, plant, channel.id, shift.planId);
    const verdictId = await insertVerdict(app.database, plant, { channel, lot }, { fitId, score: 4.2 });
    return insertHold(app.database, plant, { lot, causes: [{ channel, verdictId, intakeId, signal: options.signal }] });
  }
  const decide = (id: number, headers: Headers, body: object = {}) =>
    app.http
      .post(`/api/holds/${id}/decision`)
      .set(headers)
      .send({
        disposition: 'release',
        reason: 'Retained samples are fine.',
        password: PASSWORD,
        evidenceVersion: 1,
        ...body,
      });

  it('release and scrap with a signature, mail the line once, and stand in the audit', async () => {
    const [released, scrapped] = [await openHold(), await openHold()];
    await decide(released, as.manager).expect(204);
    await decide(scrapped, as.manager, { disposition: 'scrap', note: 'Roll 3.' }).expect(204);
    const { body } = await app.http.get(`/api/holds/${scrapped}`).set(as.lead).expect(200);
    expect(body).toMatchObject({
      state: 'decided',
      decision: {
        disposition: 'scrap',
        reason: 'Retained samples are fine.',
        note: 'Roll 3.',
        by: 'manager',
        meaning: 'scrapped',
        at: '2026-03-11T12:00:00.000Z',
      },
    });
    const mails = await app.database<{ kind: string }>('outbox').where({ kind: 'decision' });
    expect(mails).toHaveLength(8);
    const audit = await app.database('audit_entries').where({ thing_kind: 'hold', thing_id: released });
    expect(audit).toEqual([
      expect.objectContaining({
        action: 'release',
        actor_name: 'manager',
        before: expect.anything(),
        after: expect.anything(),
      }),
    ]);
  });

  it('are refused on evidence that changed, and when somebody decided before', async () => {
    const id = await openHold();
    expectProblem(await decide(id, as.manager, { evidenceVersion: 2 }), 409, 'evidence-changed');
    await decide(id, as.manager).expect(204);
    expectProblem(await decide(id, as.manager), 409, 'already-decided');
  });

  it('need the own password, a reason and a known disposition', async () => {
    const id = await openHold();
    const wrong = await decide(id, as.manager, { password: 'not mine' });
    expectProblem(wrong, 400, 'wrong-password');
    expect(wrong.body.errors[0].pointer).toBe('/password');
    const empty = await decide(id, as.manager, { reason: '  ', disposition: 'burn' });
    expect(empty.status).toBe(400);
    expect((empty.body.errors as { pointer: string }[]).map((error) => error.pointer).sort()).toEqual([
      '/disposition',
      '/reason',
    ]);
    expect(await app.database('decision_holds').where({ hold_id: id })).toEqual([]);
  });

  it('are the engineer’s only for a release from control limits alone, and never of an own intake', async () => {
    const { engineer } = shift.plant.people;
    expectProblem(await decide(await openHold({ confirmedBy: engineer.id }), as.engineer), 403, 'may-not-decide');
    await decide(await openHold({ confirmedBy: engineer.id }), as.engineer2).expect(204);
    expectProblem(await decide(await openHold(), as.engineer2, { disposition: 'scrap' }), 403, 'may-not-decide');
    expectProblem(
      await decide(await openHold({ signal: 'outside_specification' }), as.engineer2),
      403,
      'may-not-decide',
    );
    expectProblem(
      await decide(await openHold({ confirmedBy: shift.plant.people.manager.id }), as.manager),
      403,
      'may-not-decide',
    );
  });

  it('are closed to other roles, other plants and nobody', async () => {
    const id = await openHold();
    for (const who of ['lead', 'technician', 'director'] as const)
      expectProblem(await decide(id, as[who]), 403, 'may-not-decide');
    expectProblem(await decide(id, as.stranger), 404, 'not-found');
    expectProblem(await decide(999_999, as.manager), 404, 'not-found');
    expect((await app.http.post(`/api/holds/${id}/decision`).send({})).status).toBe(401);
  });

  describe('set aside', () => {
    const setAside = (id: number, headers: Headers, body: object = { place: 'bay 7' }) =>
      app.http.post(`/api/holds/${id}/set-aside`).set(headers).send(body);

    it('is confirmed once by the line lead', async () => {
      const id = await openHold();
      await setAside(id, as.lead).expect(204);
      const { body } = await app.http.get(`/api/holds/${id}`).set(as.manager).expect(200);
      expect(body.setAside).toEqual({ by: 'lead', at: '2026-03-11T12:00:00.000Z', place: 'bay 7' });
      expectProblem(await setAside(id, as.lead), 409, 'already-set-aside');
    });

    it('is refused of decided lots, bad places, other roles and other plants', async () => {
      expectProblem(await setAside(shift.holds.released, as.lead), 409, 'already-decided');
      const id = await openHold();
      expect((await setAside(id, as.lead, { place: 7 })).status).toBe(400);
      expectProblem(await setAside(id, as.director), 403, 'forbidden');
      expectProblem(await setAside(id, as.technician), 403, 'forbidden');
      expectProblem(await setAside(id, as.stranger), 404, 'not-found');
      expect((await app.http.post(`/api/holds/${id}/set-aside`)).status).toBe(401);
    });
  });
});

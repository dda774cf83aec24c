import type { DeskItem } from '@app/contracts';
import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';
import { insertFit, insertVerdict } from '../support/factories/verdicts';

describe('the desk', () => {
  let app: TestApp;
  let shift: TestShift;
  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app, { engineerMayRelease: true });
    const { plant } = shift;
    const db = app.database;
    await insertPlan(db, plant, plant.channels[1], { state: 'proposed' });
    const uploaded = { receivedBy: plant.people.engineer2.id };
    await insertIntake(db, plant, { ...uploaded, state: 'refused', receivedAt: new Date('2026-03-01T09:00:00Z') });
    await insertIntake(db, plant, {
      ...uploaded,
      state: 'needs_attention',
      receivedAt: new Date('2026-03-11T11:00:00Z'),
    });
    await insertIntake(db, plant, {
      ...uploaded,
      state: 'refused',
      receivedAt: new Date('2026-03-11T11:48:00Z'),
      failure: 'The file is not an Excel workbook.',
    });
    const channel = plant.channels[1];
    const lot = await insertLot(db, plant, { number: '24123', startsAt: '2026-03-11T09:00:00Z' });
    await insertReadings(db, plant, { channel, lot, intakeId: shift.intakeId }, [25, 25.1]);
    const fitId = await insertFit(db, plant, channel.id);
    await insertVerdict(db, plant, { channel, lot }, { fitId, score: null, notScoredReason: 'beyond_allowance' });
  });
  afterAll(() => app.close());

  async function desk(name: string): Promise<DeskItem[]> {
    const headers = await signIn(app, `${name}@marrowby.example`);
    const { body } = await app.http.get(`/api/desk?plantId=${shift.plant.id}`).set(headers).expect(200);
    return body.items as DeskItem[];
  }
  const groups = (items: DeskItem[]) => items.map((item) => item.group);

  it('of the manager holds what to decide, approve, check and set aside', async () => {
    const items = await desk('manager');
    expect(groups(items)).toEqual(['decide', 'approve', 'check', 'set_aside']);
    expect(items[0]).toEqual({
      group: 'decide',
      lineId: shift.plant.lines[0].id,
      lineName: 'Coater 2',
      sentence:
        'Lot 24118, Coater 2: lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ). Held 3 h 12 min.',
      since: '2026-03-11T08:48:00.000Z',
      action: { label: 'Decide lot 24118', path: `/holds/${shift.holds.open}` },
    });
    expect(items[1].sentence).toBe('Plan 1 for Web thickness, Coater 2, was proposed by engineer 10 d 3 h ago.');
    expect(items[2].sentence).toContain('so lot 24123 could not be scored. Check gauge LT-118.');
    expect(items[3].action).toEqual({ label: 'Set lot 24118 aside', path: `/holds/${shift.holds.open}` });
  });

  it('says of an old hold that it was reminded of', async () => {
    const row = { plant_id: shift.plant.id, hold_id: shift.holds.open, audience: 'quality_manager' };
    await app.database('hold_reminders').insert({ ...row, reminded_at: new Date('2026-03-11T11:00:00Z') });
    const [item] = await desk('manager');
    expect(item.sentence).toMatch(/ Held 3 h 12 min\. The quality managers were reminded 1 h ago\.$/);
    const headers = await signIn(app, 'manager@marrowby.example');
    const { body } = await app.http.get(`/api/holds/${shift.holds.open}`).set(headers).expect(200);
    expect(body.reminders).toEqual([{ audience: 'quality_manager', at: '2026-03-11T11:00:00.000Z' }]);
    await app.database('hold_reminders').delete();
  });

  it('of an engineer leaves out a hold of their own intake', async () => {
    expect(groups(await desk('engineer'))).toEqual(['check', 'set_aside']);
  });

  it('of another engineer holds it, and their own workbooks to see to', async () => {
    const items = await desk('engineer2');
    expect(groups(items)).toEqual(['decide', 'fix', 'fix', 'check', 'set_aside']);
    expect(items[1]).toMatchObject({
      sentence: 'coater-2-early.xlsx, Coater 2: 0 rows read, 0 not used; it waits for your word. Received 1 h ago.',
      action: { label: 'Confirm the workbook' },
    });
    expect(items[2].sentence).toBe(
      'coater-2-early.xlsx, Coater 2: refused. The file is not an Excel workbook. Received 12 min ago.',
    );
  });

  it('of the line lead holds what to set aside, of the technician what to check, of the director nothing', async () => {
    expect(groups(await desk('lead'))).toEqual(['set_aside']);
    expect(groups(await desk('technician'))).toEqual(['check']);
    expect(await desk('director')).toEqual([]);
  });

  it('of the manager holds a specification that another person proposed, and not their own', async () => {
    const { plant } = shift;
    const proposal = {
      plant_id: plant.id,
      product_id: plant.productId,
      characteristic_id: plant.channels[0].characteristicId,
      nominal: 182,
      lower: 178,
      upper: 186,
      applies_to_individuals: true,
      valid_from: new Date('2026-03-12T06:00:00Z'),
      reason: 'New customer agreement.',
      proposed_by: plant.people.engineer.id,
      proposed_at: new Date('2026-03-11T10:00:00Z'),
    };
    const [{ id }] = await app.database('specification_proposals').insert(proposal).returning('id');
    const path = `/plants/${plant.id}/set-up/specifications`;
    const found = async (name: string) => (await desk(name)).filter((item) => item.action.path === path);
    expect(await found('manager')).toEqual([
      {
        group: 'approve',
        lineId: null,
        lineName: null,
        sentence: 'A specification of SEP-16, Coat weight, was proposed by engineer 2 h ago.',
        since: '2026-03-11T10:00:00.000Z',
        action: { label: 'Read the specification', path },
      },
    ]);
    expect(await found('engineer2')).toEqual([]);
    await app.database('specification_proposals').where({ id }).update({ proposed_by: plant.people.manager.id });
    expect(await found('manager')).toEqual([]);
    await app.database('specification_proposals').where({ id }).delete();
  });

  it('asks nobody to set aside on a line that is not theirs', async () => {
    await app.database('line_assignments').where({ person_id: shift.plant.people.lead.id }).delete();
    expect(await desk('lead')).toEqual([]);
  });

  it('of a plant where one is nobody is not there', async () => {
    const other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    const headers = await signIn(app, 'manager@marrowby.example');
    expectProblem(await app.http.get(`/api/desk?plantId=${other.id}`).set(headers), 404, 'not-found');
    expectProblem(await app.http.get('/api/desk?plantId=999999').set(headers), 404, 'not-found');
  });

  it('needs a plant and a sign-in', async () => {
    const headers = await signIn(app, 'manager@marrowby.example');
    const response = await app.http.get('/api/desk').set(headers);
    expectProblem(response, 400, 'invalid-input');
    expect(response.body.errors[0].pointer).toBe('/plantId');
    expectProblem(await app.http.get('/api/desk?plantId=1'), 401, 'not-signed-in');
  });
});

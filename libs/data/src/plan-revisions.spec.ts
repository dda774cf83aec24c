import { insertPlan, planParameters } from '../../../test/support/factories/plans';
import { insertPlant } from '../../../test/support/factories/plant';
import {
  findPlan,
  insertPlanDraft,
  listPlans,
  updatePlanApproved,
  updatePlanFailed,
  updatePlanProposed,
} from './plan-revisions';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const AT = new Date('2026-03-11T14:20:00Z');

describe('plan revisions', () => {
  let place: PlantDatabase;
  let channelId: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    channelId = place.plant.channels[0].id;
  });

  const draft = () =>
    place.db.transaction((tx) =>
      insertPlanDraft(tx, {
        plantId: place.plant.id,
        channelId,
        reason: 'new gauge',
        isRobust: true,
        draftedBy: place.plant.people.engineer.id,
        draftedAt: AT,
      }),
    );
  const propose = (id: number) =>
    place.db.transaction((tx) =>
      updatePlanProposed(tx, id, {
        parameters: planParameters(place.plant.channels[0]) as never,
        report: { cautions: [], leftOutLots: ['24101'] } as never,
        by: place.plant.people.engineer.id,
        at: AT,
      }),
    );
  const approve = (id: number, by = place.plant.people.manager.id) =>
    place.db.transaction((tx) => updatePlanApproved(tx, { id, channelId }, by, AT));

  it('go from draft to proposed to in force, and retire the one before', async () => {
    const first = await insertPlan(place.db, place.plant, place.plant.channels[0]);
    const id = await draft();
    expect(await findPlan(place.db, id)).toMatchObject({
      revision: 2,
      state: 'draft',
      reason: 'new gauge',
      isRobust: true,
      parameters: null,
    });
    await propose(id);
    expect(await findPlan(place.db, id)).toMatchObject({
      state: 'proposed',
      proposedByName: 'engineer',
      parameters: { limit: 3 },
      report: { leftOutLots: ['24101'] },
    });
    await approve(id);
    expect((await listPlans(place.db, channelId)).map((plan) => [plan.id, plan.state, plan.approvedByName])).toEqual([
      [id, 'in_force', 'manager'],
      [first, 'retired', 'manager'],
    ]);
  });

  it('are retired with the sentence when they cannot be worked out, and make room for another', async () => {
    const id = await draft();
    await place.db.transaction((tx) => updatePlanFailed(tx, id, 'Too few lots.', AT));
    expect(await findPlan(place.db, id)).toMatchObject({ state: 'retired', failure: 'Too few lots.' });
    expect(await findPlan(place.db, await draft())).toMatchObject({ revision: 2 });
  });

  it('change nothing when they are worked out a second time', async () => {
    const id = await draft();
    await propose(id);
    await place.db.transaction((tx) => updatePlanFailed(tx, id, 'Too few lots.', AT));
    await propose(id);
    expect(await findPlan(place.db, id)).toMatchObject({ state: 'proposed', failure: null });
  });

  it('are pending one at a time, also when two people ask at once', async () => {
    const answers = await Promise.allSettled([draft(), draft()]);
    expect(answers.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    await expect(draft()).rejects.toThrow('plan_revisions_one_pending');
  });

  describe('the database itself refuses', () => {
    it('approval by the proposer', async () => {
      const id = await draft();
      await propose(id);
      await expect(approve(id, place.plant.people.engineer.id)).rejects.toThrow('plan_revisions_second_person');
      expect(await findPlan(place.db, id)).toMatchObject({ state: 'proposed' });
    });

    it('a second revision in force', async () => {
      await insertPlan(place.db, place.plant, place.plant.channels[0]);
      await expect(insertPlan(place.db, place.plant, place.plant.channels[0], { revision: 2 })).rejects.toThrow(
        'plan_revisions_one_in_force',
      );
    });

    it.each([
      ['a limit', "parameters = jsonb_set(parameters, '{limit}', '9')"],
      ['the reason', "reason = 'another'"],
      ['the proposer', 'proposed_by = approved_by'],
    ])('to change %s once it is proposed', async (_what, change) => {
      await insertPlan(place.db, place.plant, place.plant.channels[0]);
      await expect(place.db.raw(`update plan_revisions set ${change}`)).rejects.toThrow(
        'cannot change once it is proposed',
      );
    });

    it('to go back, and to be deleted', async () => {
      await insertPlan(place.db, place.plant, place.plant.channels[0]);
      await expect(place.db.raw("update plan_revisions set state = 'proposed'")).rejects.toThrow(
        'cannot go from in_force to proposed',
      );
      await expect(place.db.raw('delete from plan_revisions')).rejects.toThrow('plan revisions are kept');
    });

    it('parameters that lack what judging needs', async () => {
      const id = await draft();
      const incomplete = place
        .db('plan_revisions')
        .where({ id })
        .update({ parameters: JSON.stringify({ limit: 3 }) });
      await expect(incomplete).rejects.toThrow('plan_revisions_parameters_check');
    });

    it('a plan for a channel of another plant', async () => {
      const other = await insertPlant(place.db, { name: 'Elsewhere', domain: 'elsewhere.example' });
      await expect(insertPlan(place.db, place.plant, other.channels[0])).rejects.toThrow('plan_revisions_channel_fkey');
    });

    it.each([
      "update breaks set reason = 'x'",
      'delete from breaks',
      'truncate breaks cascade',
      'delete from exclusions',
    ])('to %s', async (sql) => {
      await expect(place.db.raw(sql)).rejects.toThrow('append-only');
    });
  });
});

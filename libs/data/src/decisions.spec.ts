import { insertHold } from '../../../test/support/factories/holds';
import { insertIntake } from '../../../test/support/factories/lots';
import { insertFit, insertVerdict } from '../../../test/support/factories/verdicts';
import type { Transaction } from './database';
import {
  findHoldForDecision,
  type HoldForDecision,
  insertDecision,
  insertSetAside,
  listOpenHolds,
  lockHold,
} from './decisions';
import { recordJudgements } from './record-judgements';
import { judgedChannel, judgedLot } from './testing/judged';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const AT = new Date('2026-03-11T14:20:00Z');

describe('deciding holds', () => {
  let place: PlantDatabase;
  let holdId: number;
  let intakeId: number;
  let lot: { id: number; number: string; startsAt: Date; endsAt: Date };
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    const { db, plant } = place;
    const [channel] = plant.channels;
    await place.takeIn([
      { lot: '24117', channelId: channel.id, at: AT.getTime(), value: 60, quantity: 500, quantityUnit: 'm' },
    ]);
    lot = { id: (await db('lots').first()).id, number: '24117', startsAt: AT, endsAt: AT };
    intakeId = await insertIntake(db, plant, { confirmedBy: plant.people.engineer.id });
    const verdictId = await insertVerdict(
      db,
      plant,
      { channel, lot },
      { fitId: await insertFit(db, plant, channel.id), score: -4.3 },
    );
    holdId = await insertHold(db, plant, { lot, causes: [{ channel, verdictId, intakeId }] });
  });

  const decide = (tx: Transaction, hold: HoldForDecision, by = place.plant.people.manager) =>
    insertDecision(tx, hold, {
      disposition: 'release',
      reason: 'measured again',
      note: null,
      by,
      meaning: 'released',
      at: AT,
    });
  const decideNow = (by = place.plant.people.manager) =>
    place.db.transaction(async (tx) => decide(tx, (await lockHold(tx, holdId)) as HoldForDecision, by));

  it('knows of a hold what a decision needs', async () => {
    expect(await findHoldForDecision(place.db, holdId)).toMatchObject({
      id: holdId,
      lotNumber: '24117',
      lineName: 'Coater 2',
      quantity: 500,
      quantityUnit: 'm',
      state: 'open',
      evidenceVersion: 1,
      engineerMayRelease: false,
      isForControlLimitsAlone: true,
      confirmerIds: [place.plant.people.engineer.id],
      isSetAside: false,
      sentences: [expect.stringContaining('4.3 σ below')],
    });
    expect(await findHoldForDecision(place.db, holdId + 1)).toBeUndefined();
  });

  it('ends the hold with a signature, the evidence that it was taken on, and one part', async () => {
    expect(await listOpenHolds(place.db, place.plant.id)).toEqual([
      { id: holdId, lotNumber: '24117', evidenceVersion: 1 },
    ]);
    const id = await decideNow();
    expect(await place.db('decisions')).toMatchObject([
      { id, printed_name: 'manager', meaning: 'released', decided_at: AT },
    ]);
    expect(await place.db('decision_holds')).toMatchObject([{ hold_id: holdId, evidence_version: 1 }]);
    expect(await place.db('decision_parts')).toMatchObject([{ disposition: 'release', quantity: 500 }]);
    expect(await findHoldForDecision(place.db, holdId)).toMatchObject({ state: 'decided' });
    expect(await listOpenHolds(place.db, place.plant.id)).toEqual([]);
  });

  it('decides a lot without a quantity as one part', async () => {
    await place.db('lots').update({ quantity: null, quantity_unit: null });
    await decideNow();
    expect(await place.db('decision_parts')).toMatchObject([{ quantity: null }]);
  });

  it('leaves nothing behind when its transaction is rolled back', async () => {
    const failing = place.db.transaction(async (tx) => {
      await decide(tx, (await lockHold(tx, holdId)) as HoldForDecision);
      throw new Error('the power fails');
    });
    await expect(failing).rejects.toThrow('the power fails');
    expect(await place.db('decisions')).toEqual([]);
    expect(await findHoldForDecision(place.db, holdId)).toMatchObject({ state: 'open' });
  });

  it('is seen by who comes second, and is not done twice', async () => {
    const tries = await Promise.allSettled([decideNow(), decideNow()]);
    expect(tries.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await place.db('decisions')).toHaveLength(1);
  });

  it('never waits in a circle with a scoring of the same lot', async () => {
    const channel = { channelId: place.plant.channels[0].id, plantId: place.plant.id, inputsVersion: 1, plan: null };
    const noScore = { controlState: 'not_scored', notScoredReason: 'learning', score: null } as const;
    const score = (lotMean: number) =>
      place.db.transaction((tx) =>
        recordJudgements(tx, [judgedChannel(channel, [judgedLot(lot.id, { ...noScore, lotMean })])], {
          intakeId: null,
          methodVersion: '1',
          at: AT,
        }),
      );
    const look = () =>
      place.db.transaction(async (tx) => {
        await lockHold(tx, holdId);
        await new Promise((resolve) => setTimeout(resolve, 5));
        await tx.raw('update channels set inputs_version = inputs_version where id = ?', [channel.channelId]);
      });
    await Promise.all(Array.from({ length: 20 }, (_, index) => (index % 2 === 0 ? score(60 + index) : look())));
    expect(await place.db('verdicts')).toHaveLength(11);
  });

  it('takes the line lead’s word once', async () => {
    const setAside = () =>
      place.db.transaction((tx) =>
        insertSetAside(tx, { holdId, plantId: place.plant.id, place: 'bay 7', by: place.plant.people.lead.id, at: AT }),
      );
    await setAside();
    expect(await findHoldForDecision(place.db, holdId)).toMatchObject({ isSetAside: true });
    await expect(setAside()).rejects.toThrow('set_asides_pkey');
  });

  describe('the database itself refuses', () => {
    it('a decision by who confirmed the intake that a cause came from', async () => {
      await expect(decideNow(place.plant.people.engineer)).rejects.toThrow(
        'nobody decides a hold that came from an intake which they confirmed',
      );
    });

    const decideInParts = (parts: object[]) =>
      place.db.transaction(async (tx) => {
        const { plant } = place;
        const [{ id }] = await tx('decisions')
          .insert({
            plant_id: plant.id,
            reason: 'x',
            decided_by: plant.people.manager.id,
            printed_name: 'manager',
            meaning: 'released',
            decided_at: AT,
          })
          .returning('id');
        const whole = { plant_id: plant.id, decision_id: id, hold_id: holdId };
        await tx('decision_holds').insert({ ...whole, evidence_version: 1 });
        for (const part of parts) await tx('decision_parts').insert({ ...whole, ...part });
      });

    it.each([
      ['no parts', []],
      ['too little', [{ disposition: 'release', quantity: 499 }]],
      [
        'too much',
        [
          { disposition: 'release', quantity: 300 },
          { disposition: 'scrap', quantity: 300 },
        ],
      ],
      ['a part without a quantity', [{ disposition: 'release', quantity: 500 }, { disposition: 'scrap' }]],
    ])('a decision with %s', async (_what, parts) => {
      await expect(decideInParts(parts)).rejects.toThrow('the parts of a decision must sum to the lot');
    });

    it('takes parts that sum to the lot', async () => {
      await decideInParts([
        { disposition: 'release', quantity: 166.7 },
        { disposition: 'scrap', quantity: 333.3 },
      ]);
      expect(await place.db('decision_parts')).toHaveLength(2);
    });

    it.each([
      [
        'a concession without quantity or expiry',
        { disposition: 'concession', quantity: 500, allowed_by: 'the customer' },
        'decision_parts_concession_check',
      ],
      [
        'a concession that nobody allowed',
        { disposition: 'concession', quantity: 500, concession_quantity: 500 },
        'decision_parts_concession_check',
      ],
      ['a regrade to nothing', { disposition: 'regrade', quantity: 500 }, 'decision_parts_regrade_check'],
      ['an unknown disposition', { disposition: 'hide', quantity: 500 }, 'decision_parts_disposition_check'],
    ])('%s', async (_what, part, constraint) => {
      await expect(decideInParts([part])).rejects.toThrow(constraint);
    });

    it.each([
      "update decisions set reason = 'x'",
      'delete from decisions',
      'truncate decisions cascade',
      'update decision_holds set evidence_version = 2',
      'delete from decision_parts',
    ])('to %s', async (sql) => {
      await decideNow();
      await expect(place.db.raw(sql)).rejects.toThrow('append-only');
    });

    it.each(["update audit_entries set sentence = 'x'", 'delete from audit_entries', 'truncate audit_entries'])(
      'to %s',
      async (sql) => {
        await expect(place.db.raw(sql)).rejects.toThrow('append-only');
      },
    );
  });
});

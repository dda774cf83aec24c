import type { LotJudgement } from '@app/scoring';
import { insertDecision } from '../../../test/support/factories/holds';
import { type Recorded, recordJudgements } from './record-judgements';
import { judgedChannel, judgedLot, outsideLot } from './testing/judged';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const START = Date.parse('2026-03-11T06:00:00Z');
const AT = new Date('2026-03-11T14:20:00Z');
const BEFORE_ALL = new Date('2026-03-01T00:00:00Z');

describe('holding lots', () => {
  let place: PlantDatabase;
  let lotId: number;
  let otherLotId: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    const [weight, thickness] = place.plant.channels.map(({ id }) => id);
    await place.takeIn([
      { lot: '24117', channelId: weight, at: START, value: 60, quantity: 500, quantityUnit: 'm' },
      { lot: '24117', channelId: thickness, at: START, value: 25 },
      { lot: '24118', channelId: weight, at: START + 1000, value: 60 },
    ]);
    const lots = (await place.db('lots').orderBy('number')) as { id: number }[];
    [lotId, otherLotId] = lots.map(({ id }) => id);
  });

  /** Judges the lots on each channel; plans are those that hold everything unless told. */
  const judge = (
    perChannel: LotJudgement[][],
    { isFirst = false, approvedAt = BEFORE_ALL } = {},
  ): Promise<Recorded> => {
    const channels = perChannel.map((lots, index) => {
      const judged = judgedChannel(
        {
          channelId: place.plant.channels[index].id,
          plantId: place.plant.id,
          inputsVersion: 1,
          plan: { id: 0, approvedAt, isFirst, limit: 3 },
        },
        lots,
      );
      return judged;
    });
    return place.db.transaction(async (tx) => {
      for (const channel of channels)
        channel.plan = channel.plan && { ...channel.plan, id: await planOf(channel.channelId) };
      return recordJudgements(tx, channels, { intakeId: null, methodVersion: '1', at: AT });
    });
  };
  const planOf = async (channelId: number): Promise<number> => {
    const known = await place.db('plan_revisions').where({ channel_id: channelId }).first('id');
    if (known) return known.id as number;
    const [{ id }] = await place
      .db('plan_revisions')
      .insert({
        plant_id: place.plant.id,
        channel_id: channelId,
        revision: 1,
        state: 'draft',
        reason: 'x',
        drafted_by: place.plant.people.engineer.id,
        drafted_at: AT,
      })
      .returning('id');
    return id as number;
  };
  const holds = () => place.db('holds').orderBy('id');

  it('opens one hold a lot with all its causes as sentences', async () => {
    const { held } = await judge([[outsideLot(lotId), judgedLot(otherLotId)], [outsideLot(lotId, { score: 5.06 })]]);
    expect(held).toEqual([
      expect.objectContaining({
        lotId,
        lotNumber: '24117',
        isNew: true,
        isLate: false,
        lineId: place.plant.lines[0].id,
      }),
    ]);
    expect(held[0].causes.map(({ sentence }) => sentence)).toEqual([
      'lies 4.3\u202fσ below its baseline in coat weight (control limit 3.0\u202fσ)',
      'lies 5.1\u202fσ above its baseline in web thickness (control limit 3.0\u202fσ)',
    ]);
    expect(await holds()).toMatchObject([{ lot_id: lotId, state: 'open', evidence_version: 1, opened_at: AT }]);
  });

  it('holds nothing for a signal that is only a notice or off', async () => {
    const { held } = await judge([
      [
        outsideLot(lotId, { signals: [{ signal: 'lot_mean', action: 'notice', facts: {} }] }),
        outsideLot(otherLotId, { signals: [{ signal: 'lot_mean', action: 'off', facts: {} }] }),
      ],
    ]);
    expect(held).toEqual([]);
    expect(await holds()).toEqual([]);
  });

  it('adds a cause to an open hold, says that it is not new, and counts its evidence up', async () => {
    await judge([[outsideLot(lotId)]]);
    const { held } = await judge([[], [outsideLot(lotId)]]);
    expect(held).toMatchObject([{ lotId, isNew: false, causes: [{ channelId: place.plant.channels[1].id }] }]);
    expect(await holds()).toMatchObject([{ evidence_version: 2 }]);
    expect(await place.db('hold_causes')).toHaveLength(2);
  });

  it('counts the evidence of an open hold up when a verdict of its lot changes, and not when none does', async () => {
    await judge([[outsideLot(lotId)]]);
    await judge([[outsideLot(lotId)]]);
    expect(await holds()).toMatchObject([{ evidence_version: 1 }]);
    expect((await judge([[outsideLot(lotId, { score: -4.4 })]])).held).toEqual([]);
    expect(await holds()).toMatchObject([{ evidence_version: 2 }]);
    await judge([[judgedLot(lotId)]]);
    expect(await holds()).toMatchObject([{ state: 'open', evidence_version: 3 }]);
  });

  it('does not hold a lot again for a cause that was decided, but for another one', async () => {
    const { held } = await judge([[outsideLot(lotId)]]);
    await insertDecision(place.db, place.plant, { holdId: held[0].holdId, disposition: 'release' });
    expect((await judge([[outsideLot(lotId, { score: -4.9 })]])).held).toEqual([]);
    expect(await holds()).toMatchObject([{ state: 'decided', evidence_version: 1 }]);
    const again = await judge([
      [
        outsideLot(lotId, {
          score: -5,
          signals: [
            { signal: 'lot_mean', action: 'holds', facts: {} },
            { signal: 'outside_specification', action: 'holds', facts: { countBelow: 1, countAbove: 0 } },
          ],
        }),
      ],
    ]);
    expect(again.held).toMatchObject([{ isNew: true, causes: [{ signal: 'outside_specification' }] }]);
    expect(await holds()).toMatchObject([{ state: 'decided' }, { state: 'open' }]);
  });

  it('says of a lot that was within its control limits before that it is held late', async () => {
    await judge([
      [
        judgedLot(lotId),
        judgedLot(otherLotId, { controlState: 'not_scored', notScoredReason: 'learning', score: null }),
      ],
    ]);
    const { held } = await judge([[outsideLot(lotId), outsideLot(otherLotId)]]);
    expect(held.map(({ lotNumber, isLate }) => [lotNumber, isLate])).toEqual([
      ['24117', true],
      ['24118', false],
    ]);
  });

  it('holds by a first plan only lots that end after its approval, but any lot outside its specification', async () => {
    const approvedAt = new Date(START + 500);
    const outside = {
      signal: 'outside_specification' as const,
      action: 'holds' as const,
      facts: { countBelow: 1, countAbove: 0 },
    };
    const { held } = await judge([[outsideLot(lotId), outsideLot(otherLotId)]], { isFirst: true, approvedAt });
    expect(held.map(({ lotNumber }) => lotNumber)).toEqual(['24118']);
    const later = await judge([[outsideLot(lotId, { score: -6, signals: [...outsideLot(lotId).signals, outside] })]], {
      isFirst: true,
      approvedAt,
    });
    expect(later.held).toMatchObject([{ lotNumber: '24117', causes: [{ signal: 'outside_specification' }] }]);
  });

  it('holds by a later plan also lots made before its approval', async () => {
    const { held } = await judge([[outsideLot(lotId)]], { isFirst: false, approvedAt: AT });
    expect(held).toHaveLength(1);
  });

  describe('the database itself', () => {
    it('has at most one open hold a lot', async () => {
      await judge([[outsideLot(lotId)]]);
      const second = place.db.raw(
        `insert into holds (plant_id, line_id, lot_id, state, opened_at, is_late) select plant_id, line_id, lot_id, 'open', opened_at, false from holds`,
      );
      await expect(second).rejects.toThrow('holds_one_open');
    });

    it.each(["update hold_causes set sentence = 'x'", 'delete from hold_causes', 'truncate hold_causes'])(
      'refuses to %s',
      async (sql) => {
        await judge([[outsideLot(lotId)]]);
        await expect(place.db.raw(sql)).rejects.toThrow('append-only');
      },
    );
  });
});

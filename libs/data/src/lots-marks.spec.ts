import { createTestDatabase, type TestDatabase } from '../../../test/support/database';
import { insertDecision, insertHold } from '../../../test/support/factories/holds';
import { insertRow } from '../../../test/support/factories/insert';
import { insertIntake, insertLot, insertReadings, type TestLot } from '../../../test/support/factories/lots';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { insertFit, insertVerdict, type VerdictOptions } from '../../../test/support/factories/verdicts';
import { createDatabase, type Database } from './database';
import { mapLotMarks } from './lots-marks';

describe("a lot's mark", () => {
  let test: TestDatabase;
  let db: Database;
  let plant: TestPlant;
  let intakeId: number;
  let fitIds: number[];
  let number = 100;
  beforeAll(async () => {
    test = await createTestDatabase();
    db = createDatabase(test.url);
    plant = await insertPlant(db);
    intakeId = await insertIntake(db, plant);
    fitIds = [await insertFit(db, plant, plant.channels[0].id), await insertFit(db, plant, plant.channels[1].id)];
  });
  afterAll(async () => {
    await db.destroy();
    await test.drop();
  });

  async function judge(...verdicts: Omit<VerdictOptions, 'fitId'>[]): Promise<{ lot: TestLot; verdictIds: number[] }> {
    const lot = await insertLot(db, plant, { number: `${number++}`, startsAt: '2026-03-10T20:00:00Z' });
    const verdictIds: number[] = [];
    for (const [index, verdict] of verdicts.entries()) {
      const channel = plant.channels[index];
      await insertReadings(db, plant, { channel, lot, intakeId }, [channel.nominal]);
      verdictIds.push(await insertVerdict(db, plant, { channel, lot }, { fitId: fitIds[index], ...verdict }));
    }
    return { lot, verdictIds };
  }
  const markOf = async (lot: TestLot, channelId?: number) => (await mapLotMarks(db, [lot.id], channelId)).get(lot.id);

  it('is the worst of its verdicts on all channels, and that of one channel where one is asked for', async () => {
    const { lot } = await judge(
      { score: 1, isProvisional: true, specificationState: 'outside_specification' },
      { score: 4, signals: [{ signal: 'baseline_moved', action: 'notice' }] },
    );
    expect(await markOf(lot)).toEqual({
      controlState: 'outside_control_limits',
      isProvisional: true,
      specificationState: 'outside_specification',
      hasNotice: true,
      holdState: null,
      disposition: null,
      isExcluded: false,
    });
    expect(await markOf(lot, plant.channels[1].id)).toMatchObject({
      controlState: 'outside_control_limits',
      isProvisional: false,
      specificationState: 'inside_specification',
    });
    expect(await markOf(lot, plant.channels[0].id)).toMatchObject({
      controlState: 'within_control_limits',
      hasNotice: false,
    });
  });

  it('is not scored rather than within, and outside rather than not scored', async () => {
    expect(await markOf((await judge({ score: 1 }, { score: null })).lot)).toMatchObject({
      controlState: 'not_scored',
    });
    expect(await markOf((await judge({ score: null }, { score: -5 })).lot)).toMatchObject({
      controlState: 'outside_control_limits',
    });
  });

  it('of a lot without verdicts is not scored', async () => {
    expect(await markOf((await judge()).lot)).toMatchObject({
      controlState: 'not_scored',
      specificationState: 'no_specification',
    });
  });

  it('leaves former verdicts out', async () => {
    const { lot } = await judge({ score: 0.2 });
    const place = { channel: plant.channels[0], lot };
    await insertVerdict(db, plant, place, { fitId: fitIds[0], score: 6, isCurrent: false });
    expect(await markOf(lot)).toMatchObject({ controlState: 'within_control_limits' });
  });

  it('shows the open hold before a decided one, and the last disposition', async () => {
    const { lot, verdictIds } = await judge({ score: 4 });
    const causes = [{ channel: plant.channels[0], verdictId: verdictIds[0] }];
    const first = await insertHold(db, plant, { lot, causes });
    expect(await markOf(lot)).toMatchObject({ holdState: 'open', disposition: null });
    await insertDecision(db, plant, { holdId: first, disposition: 'release' });
    expect(await markOf(lot)).toMatchObject({ holdState: 'decided', disposition: 'release' });
    const second = await insertHold(db, plant, { lot, causes });
    expect(await markOf(lot)).toMatchObject({ holdState: 'open', disposition: 'release' });
    await insertDecision(db, plant, { holdId: second, disposition: 'scrap' });
    expect(await markOf(lot)).toMatchObject({ holdState: 'decided', disposition: 'scrap' });
  });

  it('says that a lot is excluded until the exclusion is taken back', async () => {
    const { lot } = await judge({ score: 1 });
    const exclusion = {
      plant_id: plant.id,
      channel_id: plant.channels[0].id,
      lot_id: lot.id,
      reason: 'start-up',
      excluded_by: plant.people.engineer.id,
      excluded_at: new Date('2026-03-11T09:00:00Z'),
    };
    const id = await insertRow(db, 'exclusions', exclusion);
    expect(await markOf(lot)).toMatchObject({ isExcluded: true });
    expect(await markOf(lot, plant.channels[1].id)).toMatchObject({ isExcluded: false });
    await insertRow(db, 'exclusions', { ...exclusion, corrects_id: id, is_withdrawn: true });
    expect(await markOf(lot)).toMatchObject({ isExcluded: false });
  });

  it('of no lots is nothing', async () => {
    expect(await mapLotMarks(db, [])).toEqual(new Map());
  });
});

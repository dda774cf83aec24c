import {
  beginOwedJob,
  insertOwedJob,
  listOwedJobIds,
  lockOwedJob,
  updateOwedJobEnded,
  updateOwedJobError,
  updateOwedJobInterrupted,
} from './owed-jobs';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const AT = new Date('2026-03-11T14:20:00Z');

describe('owed jobs', () => {
  let place: PlantDatabase;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(() => place.reset());

  const owe = (intakeId = 7) =>
    place.db.transaction((tx) =>
      insertOwedJob(tx, { plantId: place.plant.id, name: 'score-intake', subject: { intakeId }, at: AT }),
    );
  const row = (id: number) => place.db('owed_jobs').where({ id }).first();

  it('are owed once, however often, by one or by two at once', async () => {
    const id = await owe();
    expect(await owe()).toBe(id);
    const [a, b] = await Promise.all([owe(8), owe(8)]);
    expect(a).toBe(b);
    expect(await listOwedJobIds(place.db)).toEqual([id, a]);
  });

  it('are owed anew once the former one is ended', async () => {
    const id = await owe();
    await updateOwedJobEnded(place.db, id, 'done', AT);
    expect(await owe()).not.toBe(id);
  });

  it('owe the same subject whatever the order of its keys', async () => {
    const owing = (subject: object) =>
      place.db.transaction((tx) =>
        insertOwedJob(tx, { plantId: place.plant.id, name: 'score-channels', subject: subject as never, at: AT }),
      );
    expect(await owing({ channelIds: [1, 2], reason: 'x', rejudgeFrom: null })).toBe(
      await owing({ rejudgeFrom: null, reason: 'x', channelIds: [1, 2] }),
    );
  });

  it('count an attempt at its begin, and not one that was cut short', async () => {
    const id = await owe();
    expect(await beginOwedJob(place.db, id)).toEqual({
      id,
      plantId: place.plant.id,
      name: 'score-intake',
      subject: { intakeId: 7 },
      attempts: 1,
    });
    await updateOwedJobError(place.db, id, 'Error: no');
    expect(await beginOwedJob(place.db, id)).toMatchObject({ attempts: 2 });
    await updateOwedJobInterrupted(place.db, id);
    expect(await row(id)).toMatchObject({ attempts: 1, last_error: 'Error: no', state: 'owed' });
  });

  it('are not begun, locked or ended again once they are ended', async () => {
    const id = await owe();
    await updateOwedJobEnded(place.db, id, 'failed', AT, 'Error: for good');
    expect(await beginOwedJob(place.db, id)).toBeUndefined();
    expect(await place.db.transaction((tx) => lockOwedJob(tx, id))).toBe(false);
    await updateOwedJobEnded(place.db, id, 'done', AT);
    expect(await row(id)).toMatchObject({ state: 'failed', last_error: 'Error: for good', ended_at: AT });
    expect(await listOwedJobIds(place.db)).toEqual([]);
  });

  it('let one of two write the outcome', async () => {
    const id = await owe();
    const finish = () =>
      place.db.transaction(async (tx) => {
        const isMine = await lockOwedJob(tx, id);
        if (isMine) await updateOwedJobEnded(tx, id, 'done', AT);
        return isMine;
      });
    const answers = await Promise.all([finish(), finish(), finish()]);
    expect(answers.filter((isMine) => isMine)).toHaveLength(1);
  });

  it('are still owed when the outcome’s transaction is rolled back', async () => {
    const id = await owe();
    const failing = place.db.transaction(async (tx) => {
      await updateOwedJobEnded(tx, id, 'done', AT);
      throw new Error('the power fails');
    });
    await expect(failing).rejects.toThrow('the power fails');
    expect(await listOwedJobIds(place.db)).toEqual([id]);
  });
});

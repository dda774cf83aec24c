import {
  findIntake,
  type IntakeRow,
  listSettledThatWouldChange,
  lockIntake,
  requestRejudgeSettled,
  updateIntakeReadAgain,
} from '@app/data';
import type { WorkbookAnswers } from '@app/contracts';
import { makeWorkbook } from '../../../../libs/workbook/src/testing/make-workbook';
import { insertHistory, insertPlans } from '../../../../test/reliability/support/history';
import { insertDecision } from '../../../../test/support/factories/holds';
import { left, lotOf, takeIn, tick, workOff } from '../testing/repeats';
import { WorkerBench } from '../testing/worker-bench';

describe('a shift that comes more than once', () => {
  let bench: WorkerBench;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());

  const begin = async () => {
    await bench.reset();
    await insertHistory(bench.db, bench.place.plant);
    await insertPlans(bench.db, bench.place.plant);
  };
  const lots = (from: number, to: number, shift = 0) =>
    bench.place.plant.channels.flatMap((channel) =>
      Array.from({ length: to - from + 1 }, (_, index) => lotOf(channel, from + index, shift)).flat(),
    );
  const manager = () => ({ id: bench.place.plant.people.manager.id, name: 'manager', email: '' });

  /** The shift as a workbook, its lots spelled as told. */
  const workbook = (readings: ReturnType<typeof lots>, spelled: (lot: string) => string = (lot) => lot) => {
    const names = new Map(bench.place.plant.channels.map(({ id, name }) => [id, name]));
    const cells = readings.map(({ at, lot, channelId, value }) => [
      new Date(at).toISOString(),
      spelled(lot),
      'SEP-16',
      names.get(channelId) as string,
      value,
    ]);
    return makeWorkbook({
      sheets: [{ name: 'Readings', rows: [['Time', 'Lot', 'Product', 'Characteristic', 'Value'], ...cells] }],
    });
  };
  /** Sent, read as answered, confirmed and scored, as the program does it. */
  const send = async (bytes: Buffer, answers?: WorkbookAnswers) => {
    tick(bench);
    const intakeId = await bench.receive(bytes);
    if (answers) {
      await bench.processor.runOwed(await bench.owe('read-intake', { intakeId }));
      await bench.db.transaction((tx) => updateIntakeReadAgain(tx, intakeId, answers));
    }
    await bench.processor.runOwed(await bench.owe('read-intake', { intakeId }));
    await bench
      .db('intakes')
      .where({ id: intakeId })
      .update({
        state: 'queued',
        confirmed_by: bench.place.plant.people.engineer.id,
        confirmed_at: tick(bench),
      });
    await bench.processor.runOwed(await bench.owe('score-intake', { intakeId }));
    await workOff(bench);
    return (await findIntake(bench.db, intakeId)) as IntakeRow;
  };

  it('leaves one set of readings and the same bits when it is sent three times, in two spellings and once half', async () => {
    await begin();
    await send(workbook(lots(24_130, 24_133, 0.02)));
    const once = await left(bench);

    await begin();
    const whole = lots(24_130, 24_133, 0.02);
    const half = await send(workbook(whole.filter((_, index) => index % 48 < 24)));
    const spelled = await send(
      workbook(whole, (lot) => `0${lot}`),
      { lots: Object.fromEntries([0, 1, 2, 3].map((index) => [`02413${index}`, `2413${index}`])) },
    );
    const again = await send(workbook(whole));
    const thrice = await left(bench);
    // A baseline stays drawn as it was before the oldest lot that was judged again: it is none of what counts.
    for (const what of Object.keys(once).filter((name) => name !== 'baselines'))
      expect({ what, rows: thrice[what] }).toEqual({ what, rows: once[what] });
    expect(
      [half, spelled, again].map(({ rowsRead, rowsUsed, rowsAlreadyThere, rowsNotUsed }) => [
        rowsRead,
        rowsUsed,
        rowsAlreadyThere,
        rowsNotUsed,
      ]),
    ).toEqual([
      [48, 48, 0, 0],
      [96, 48, 48, 0],
      [96, 0, 96, 0],
    ]);
    expect(again.comparison).toMatchObject({
      readingsNew: 0,
      readingsAlreadyThere: 96,
      readingsDiffering: 0,
      readingsNotInFile: 0,
    });
    expect(again.comparison?.overlaps.map(({ intakeId }) => intakeId)).toEqual(
      expect.arrayContaining([half.id, spelled.id]),
    );
  });

  it('judges a settled lot again when its readings are superseded, keeps the former verdict, and says so in its history', async () => {
    await begin();
    const [channel] = bench.place.plant.channels;
    for (const from of [24_130, 24_142, 24_154, 24_166, 24_178]) await takeIn(bench, lots(from, from + 11));
    await workOff(bench);
    const [lot] = await bench.db('lots').where({ number: '24140' });
    const verdicts = () => bench.db('verdicts').where({ lot_id: lot.id, channel_id: channel.id }).orderBy('id');
    const former = await verdicts();
    expect(former.at(-1)).toMatchObject({ is_provisional: false, control_state: 'within_control_limits' });

    const corrected = await takeIn(bench, lotOf(channel, 24_140, 0.6), 'supersede');
    await workOff(bench);
    const now = await verdicts();
    expect(now.slice(0, former.length - 1)).toEqual(former.slice(0, -1));
    expect(now.at(-2)).toMatchObject({ id: former.at(-1)!.id as number, is_current: false });
    expect(now.at(-1)).toMatchObject({
      is_current: true,
      is_provisional: false,
      control_state: 'outside_control_limits',
    });
    const intake = (await findIntake(bench.db, corrected)) as IntakeRow;
    expect(intake).toMatchObject({ rowsSuperseding: 12, rowsUsed: 0, readingsSuperseding: 12 });
    expect(await bench.db('audit_entries').where({ thing_kind: 'lot', thing_id: lot.id }).pluck('sentence')).toEqual([
      expect.stringMatching(
        /^12 readings of lot 24140 on .* were superseded by the intake of .*, which engineer confirmed\.$/,
      ),
    ]);
    const [hold] = await bench.db('holds').where({ lot_id: lot.id });
    expect(hold).toMatchObject({ state: 'open', is_late: true });

    // Decided; then corrected once more and still outside: the decision stands and the lot is held anew.
    await bench.db('lots').update({ quantity: 500, quantity_unit: 'm' });
    await insertDecision(bench.db, bench.place.plant, {
      holdId: hold.id as number,
      disposition: 'release',
      at: tick(bench),
    });
    await takeIn(bench, lotOf(channel, 24_140, 0.8), 'supersede');
    expect(await bench.db('holds').where({ lot_id: lot.id }).orderBy('id').pluck('state')).toEqual(['decided', 'open']);
    expect(
      (await bench.db('audit_entries').where({ action: 'supersede' }).orderBy('id').pluck('sentence')).at(-1),
    ).toContain('The lot had been decided on what was stored before.');
  });

  it('lists settled verdicts that a late shift would change, and changes them only when asked', async () => {
    await begin();
    for (const from of [24_130, 24_154, 24_166, 24_178]) await takeIn(bench, lots(from, from + 11));
    const settled = () =>
      bench
        .db('verdicts')
        .where({ is_current: true, is_provisional: false })
        .orderBy('id')
        .select('id', 'lot_id', 'score');
    await workOff(bench);
    const before = await settled();
    expect(before.length).toBeGreaterThan(10);

    const late = await takeIn(bench, lots(24_142, 24_153, 0.1));
    expect(await workOff(bench)).toEqual(['compare-settled']);
    const kept = await settled();
    expect(kept.filter(({ id }) => before.some((one) => one.id === id))).toEqual(before);
    const listed = await listSettledThatWouldChange(bench.db, late);
    expect(listed.length).toBeGreaterThan(0);
    for (const { now, would } of listed) expect(now).not.toBe(would);

    const owedJobId = (await bench.db.transaction(async (tx) =>
      requestRejudgeSettled(tx, {
        intake: (await lockIntake(tx, late)) as IntakeRow,
        person: manager(),
        at: tick(bench),
      }),
    )) as number;
    await bench.processor.runOwed(owedJobId);
    expect(await listSettledThatWouldChange(bench.db, late)).toEqual([]);
    expect(await bench.db('lots_to_rejudge')).toEqual([]);
    const after = await settled();
    const changed = before.filter(({ lot_id }) => listed.some(({ lotId }) => lotId === lot_id));
    expect(changed.length).toBeGreaterThan(0);
    expect(after.filter(({ id }) => changed.some((one) => one.id === id)).length).toBeLessThan(changed.length);
    const unlisted = before.filter(({ lot_id }) => !listed.some(({ lotId }) => lotId === lot_id));
    expect(after).toEqual(expect.arrayContaining(unlisted));
    const everything = await bench.everything();
    await bench.oweAgain(owedJobId);
    await bench.processor.runOwed(owedJobId);
    expect(await bench.everything()).toEqual(everything);
  });
});

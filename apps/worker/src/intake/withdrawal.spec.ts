import { findWithdrawalObstacle, findIntake, type IntakeRow, lockIntake, withdrawIntake } from '@app/data';
import { insertHistory, insertPlans } from '../../../../test/reliability/support/history';
import { insertDecision } from '../../../../test/support/factories/holds';
import { left, lotOf, takeIn, tick, workOff } from '../testing/repeats';
import { WorkerBench } from '../testing/worker-bench';

describe('withdrawing an intake', () => {
  let bench: WorkerBench;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());

  const begin = async () => {
    await bench.reset();
    await insertHistory(bench.db, bench.place.plant);
    await insertPlans(bench.db, bench.place.plant);
    return bench.place.plant.channels;
  };
  const shift = (from: number, to: number, wrong: Record<number, number> = {}) =>
    bench.place.plant.channels.flatMap((channel) =>
      Array.from({ length: to - from + 1 }, (_, index) =>
        lotOf(channel, from + index, wrong[from + index] ?? 0),
      ).flat(),
    );
  const later = (minutes: number) => (reading: ReturnType<typeof lotOf>[number]) => ({
    ...reading,
    at: (reading.at as number) + minutes * 60_000,
  });
  const withdraw = (id: number) =>
    bench.db.transaction(async (tx) => {
      const intake = (await lockIntake(tx, id)) as IntakeRow;
      const manager = { id: bench.place.plant.people.manager.id, name: 'manager', email: '' };
      return withdrawIntake(tx, { intake, person: manager, reason: 'It was the other line’s shift.', at: tick(bench) });
    });
  const held = () =>
    bench.db('holds').join('lots', 'lots.id', 'holds.lot_id').orderBy('number').select('number', 'state');

  it('leaves what the plant would have without it, bit for bit, also where others came after and lots are shared', async () => {
    await begin();
    await takeIn(bench, shift(24_130, 24_133));
    await takeIn(bench, shift(24_134, 24_137));
    await workOff(bench);
    const never = await left(bench);

    await begin();
    await takeIn(bench, shift(24_130, 24_133));
    const wrong = await takeIn(bench, [
      ...shift(24_138, 24_141, { 24_139: 2 }).map((reading) => ({ ...reading, quantity: 700, quantityUnit: 'm' })),
      ...shift(24_133, 24_135, { 24_133: 0.4, 24_134: -0.3 }).map(later(3)),
    ]);
    await takeIn(bench, shift(24_134, 24_137));
    await workOff(bench);
    expect(await left(bench)).not.toEqual(never);
    expect((await held()).length).toBeGreaterThan(0);

    const [owedJobId] = await withdraw(wrong);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    const after = await left(bench);
    for (const what of Object.keys(never)) expect({ what, rows: after[what] }).toEqual({ what, rows: never[what] });
    expect((await held()).every(({ state }) => state === 'withdrawn')).toBe(true);
    expect(await bench.db('readings').whereNotNull('withdrawn_at')).toHaveLength(7 * 24);
    expect(await bench.db('lots').whereNotNull('withdrawn_at').orderBy('number').pluck('number')).toEqual([
      '24138',
      '24139',
      '24140',
      '24141',
    ]);
    const before = await bench.everything();
    await bench.oweAgain(owedJobId);
    await bench.processor.runOwed(owedJobId);
    expect(await bench.everything()).toEqual(before);
  });

  it('takes back mails that nobody was sent, tells those who were, and says who withdrew what and why', async () => {
    await begin();
    const wrong = await takeIn(bench, shift(24_130, 24_133, { 24_131: 2 }));
    const mails = await bench.db('outbox').orderBy('id');
    expect(mails.length).toBeGreaterThan(2);
    await bench.db('outbox').where({ id: mails[0].id }).update({ state: 'sent', sent_at: bench.clock.now() });
    await withdraw(wrong);
    await workOff(bench);
    const told = await bench.db('outbox').orderBy('id');
    expect(told.map(({ kind, recipient }) => [kind, recipient])).toEqual([
      ['held-lots', mails[0].recipient],
      ['withdrawn-intake', mails[0].recipient],
    ]);
    expect(told[1].plain_text).toContain('ended without a decision');
    expect(told[1].plain_text).toContain('It was the other line’s shift.');
    const entries = await bench.db('audit_entries').where({ action: 'withdraw' }).orderBy('id').pluck('sentence');
    expect(entries[0]).toBe(
      'manager withdrew the intake of coater-2-early.xlsx for Coater 2, because: It was the other line’s shift.',
    );
    expect(entries[1]).toContain('ended the hold of lot 24131 without a decision');
    expect(await bench.db('verdicts').where({ is_current: true }).count('* as n')).toEqual([{ n: 60 }]);
  });

  it('puts back what it superseded, and takes the lot in again as a later workbook says it', async () => {
    const [channel] = await begin();
    await takeIn(bench, shift(24_130, 24_132));
    await workOff(bench);
    const first = await left(bench);
    const corrected = await takeIn(bench, lotOf(channel, 24_131, 0.2), 'supersede');
    await workOff(bench);
    expect((await left(bench)).readings).not.toEqual(first.readings);
    await withdraw(corrected);
    await workOff(bench);
    expect(await left(bench)).toEqual(first);
    const wrong = await takeIn(bench, lotOf(channel, 24_140));
    await withdraw(wrong);
    await takeIn(bench, lotOf(channel, 24_140, 0.01));
    expect(await bench.db('lots').where({ number: '24140' })).toMatchObject([{ withdrawn_at: null }]);
    expect(
      await bench
        .db('verdicts')
        .where({ is_current: true })
        .whereIn('lot_id', bench.db('lots').where({ number: '24140' }).select('id')),
    ).toHaveLength(1);
  });

  it('is refused once a lot was decided on its readings, and while a later intake relies on them', async () => {
    await begin();
    const wrong = await takeIn(bench, shift(24_130, 24_133, { 24_131: 2 }));
    const again = await takeIn(bench, shift(24_130, 24_134));
    await expect(withdraw(wrong)).rejects.toMatchObject({ code: 'relied-on' });
    await withdraw(again);
    await bench.db('lots').update({ quantity: 500, quantity_unit: 'm' });
    const [hold] = await bench
      .db('holds')
      .join('lots', 'lots.id', 'holds.lot_id')
      .where({ number: '24131' })
      .select('holds.id');
    await insertDecision(bench.db, bench.place.plant, { holdId: hold.id, disposition: 'scrap', at: tick(bench) });
    await expect(withdraw(wrong)).rejects.toMatchObject({
      code: 'lots-decided',
      detail: expect.stringContaining('Lot 24131 was decided'),
    });
    const intake = (await findIntake(bench.db, again)) as IntakeRow;
    expect(await findWithdrawalObstacle(bench.db, intake)).toMatchObject({ code: 'withdrawn-already' });
    expect(intake).toMatchObject({
      state: 'withdrawn',
      withdrawnByName: 'manager',
      withdrawalReason: 'It was the other line’s shift.',
    });
  });
});

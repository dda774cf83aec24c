import { compareIntake, confirmIntake, findIntake, type IntakeRow, lockIntake } from '@app/data';
import { insertIntake } from '../../../../test/support/factories/lots';
import type { TestChannel } from '../../../../test/support/factories/plant';
import { type SheetReading, stageReadings } from '../../../../libs/data/src/testing/stage-readings';
import type { WorkerBench } from './worker-bench';

const HOUR = 3_600_000;
/** The thirty lots of the history end here; lot 24130 begins. */
export const SHIFT_AT = Date.parse('2026-03-01T10:00:00Z');

/** Twelve readings of a lot of two hours on a channel, the same every time; `shift` moves them. */
export function lotOf(channel: TestChannel, number: number, shift = 0): SheetReading[] {
  return Array.from({ length: 12 }, (_, index) => ({
    lot: String(number),
    channelId: channel.id,
    at: SHIFT_AT + (number - 24_130) * 2 * HOUR + (index + 0.5) * (HOUR / 6),
    value:
      Math.round(
        1000 * (channel.nominal + 0.1 * Math.sin(number / 12) + 0.12 * Math.sin(number * 37 + index * 11) + shift),
      ) / 1000,
  }));
}

/** Each step of a scenario has its own minute. */
export function tick(bench: WorkerBench): Date {
  bench.clock.set(new Date(bench.clock.now().getTime() + 60_000));
  return bench.clock.now();
}

/** An intake as read, compared and confirmed, then scored with all that this makes necessary. */
export async function takeIn(
  bench: WorkerBench,
  readings: SheetReading[],
  differing: 'keep' | 'supersede' = 'keep',
): Promise<number> {
  const { plant } = bench.place;
  const person = { id: plant.people.engineer.id, name: 'engineer', email: '' };
  const id = await insertIntake(bench.db, plant, { state: 'needs_attention', receivedAt: tick(bench) });
  const owedJobId = await bench.db.transaction(async (tx) => {
    await tx('intakes').where({ id }).update({ rows_read: readings.length, report: '{}' });
    const intake = (await findIntake(tx, id)) as IntakeRow;
    await stageReadings(tx, intake, readings);
    await compareIntake(tx, intake, bench.clock.now());
    return confirmIntake(tx, { intake: (await lockIntake(tx, id)) as IntakeRow, person, at: tick(bench), differing });
  });
  tick(bench);
  await bench.processor.runOwed(owedJobId);
  return id;
}

/** Does all that is owed, and what that makes necessary. */
export async function workOff(bench: WorkerBench): Promise<string[]> {
  const done: string[] = [];
  for (;;) {
    const job = await bench
      .db('owed_jobs')
      .where({ state: 'owed' })
      .orderBy('id')
      .first<{ id: number; name: string }>();
    if (!job) return done;
    tick(bench);
    await bench.processor.runOwed(job.id);
    done.push(job.name);
  }
}

/** What a plant is left with, without ids and times of doing: readings in force, lots, sums, verdicts, open holds, baselines. */
export async function left(bench: WorkerBench): Promise<Record<string, unknown[]>> {
  const queries = {
    readings: `select l.number, r.channel_id, r.measured_at, r.value, r.censoring, r.occurrence, r.serial, r.position
      from readings r join lots l on l.id = r.lot_id where r.superseded_by is null and r.withdrawn_at is null order by 1, 2, 3, 6, 7, 8`,
    lots: `select number, product_id, quantity, quantity_unit, starts_at, ends_at from lots where withdrawn_at is null order by 1`,
    sums: `select l.number, to_jsonb(lc) - array['lot_id', 'line_id'] as sums from lot_channels lc join lots l on l.id = lc.lot_id
      where lc.first_at is not null order by 1, lc.channel_id`,
    verdicts: `select l.number, to_jsonb(v) - array['id', 'lot_id', 'fit_id', 'judged_at'] as verdict,
        (select jsonb_agg(to_jsonb(s) - 'verdict_id' order by s.signal) from verdict_signals s where s.verdict_id = v.id) as signals
      from verdicts v join lots l on l.id = v.lot_id where v.is_current order by 1, v.channel_id`,
    holds: `select l.number, c.channel_id, c.signal, c.sentence from holds h join lots l on l.id = h.lot_id
      join hold_causes c on c.hold_id = h.id where h.state = 'open' order by 1, 2, 3`,
    baselines: 'select channel_id, at, value, standard_error from baseline_points order by 1, 2',
    owed: 'select * from lots_to_rejudge',
  };
  const all: Record<string, unknown[]> = {};
  for (const [name, sql] of Object.entries(queries))
    all[name] = ((await bench.db.raw(sql)) as unknown as { rows: unknown[] }).rows;
  return all;
}

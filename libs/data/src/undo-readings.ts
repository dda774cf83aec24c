import { rows, type Transaction } from './database';
import { inForce } from './incoming-readings';
import type { IntakeRow } from './intakes';
import { updateLotChannels } from './lot-sums';

export interface UndoneLot {
  id: number;
  number: string;
  readings: number;
  /** No reading of it is left. */
  isWithdrawn: boolean;
}

/**
 * Takes an intake's readings out of force, set by set, and puts back what they superseded: lots and what they come to are worked out again,
 * lots of which nothing is left are withdrawn, and every verdict that may have known the readings is owed another look.
 * The caller holds the line and its channels.
 */
export async function undoReadings(
  tx: Transaction,
  intake: IntakeRow,
  at: Date,
): Promise<{ readings: number; lots: UndoneLot[] }> {
  const ids = { intakeId: intake.id, at };
  await tx.raw(
    `create temporary table undone on commit drop as
     select b.plant_id, b.channel_id, b.lot_id, l.starts_at, l.ends_at, 0::bigint as readings from intake_lots b join lots l on l.id = b.lot_id
     where b.intake_id = :intakeId`,
    ids,
  );
  await withdrawReadings(tx, ids);
  await updateLotChannels(tx, 'select channel_id, lot_id from undone');
  await tx.raw(
    `update verdicts v set is_current = false from undone u join lot_channels lc on lc.channel_id = u.channel_id and lc.lot_id = u.lot_id
     where v.channel_id = u.channel_id and v.lot_id = u.lot_id and v.is_current and lc.first_at is null`,
  );
  await updateLots(tx, ids);
  await oweLooks(tx, intake);
  await dropDrawnEnds(tx);
  const lots = await rows<UndoneLot>(
    tx,
    `select l.id, l.number, sum(u.readings)::bigint as readings, l.withdrawn_at is not null as "isWithdrawn"
     from undone u join lots l on l.id = u.lot_id group by l.id order by l.starts_at, l.id`,
  );
  await tx.raw('drop table undone');
  return { readings: lots.reduce((sum, lot) => sum + lot.readings, 0), lots };
}

/** First the intake's own, so that those in whose place they stood can come back; these may themselves stand under later ones. */
async function withdrawReadings(tx: Transaction, ids: { intakeId: number; at: Date }): Promise<void> {
  await tx.raw(
    `with gone as (
       update readings r set withdrawn_at = :at from undone u
       where r.channel_id = u.channel_id and r.lot_id = u.lot_id and r.measured_at between u.starts_at and u.ends_at
         and r.intake_id = :intakeId and ${inForce('r')} returning r.channel_id, r.lot_id
     ), sums as (select channel_id, lot_id, count(*) as readings from gone group by 1, 2)
     update undone u set readings = s.readings from sums s where s.channel_id = u.channel_id and s.lot_id = u.lot_id`,
    ids,
  );
  await tx.raw(
    `update readings r set withdrawn_at = :at from undone u
     where r.channel_id = u.channel_id and r.lot_id = u.lot_id and r.intake_id = :intakeId and r.superseded_by is not null and r.withdrawn_at is null`,
    ids,
  );
  await tx.raw(
    `update readings a set superseded_by = b.superseded_by from undone u, readings b
     where a.channel_id = u.channel_id and a.lot_id = u.lot_id and a.superseded_by is not null and b.id = a.superseded_by and b.intake_id = :intakeId`,
    ids,
  );
}

/** Spans, and quantities that only this intake said; lots without a reading are withdrawn. */
async function updateLots(tx: Transaction, ids: { intakeId: number; at: Date }): Promise<void> {
  await tx.raw(
    `update lots l set starts_at = coalesce(s.first_at, l.starts_at), ends_at = coalesce(s.last_at, l.ends_at),
       withdrawn_at = case when s.first_at is null then cast(:at as timestamptz) end
     from (
       select lc.lot_id, min(lc.first_at) as first_at, max(lc.last_at) as last_at from lot_channels lc
       where lc.lot_id in (select lot_id from undone) group by lc.lot_id
     ) s where l.id = s.lot_id`,
    ids,
  );
  await tx.raw(
    `update lots l set quantity = n.quantity, quantity_unit = n.quantity_unit
     from intake_quantities own left join lateral (
       select q.quantity, q.quantity_unit from intake_quantities q join intakes i on i.id = q.intake_id and i.state <> 'withdrawn'
       where q.lot_id = own.lot_id order by i.readings_stored_at, i.id limit 1
     ) n on true
     where own.intake_id = :intakeId and l.id = own.lot_id and (l.quantity, l.quantity_unit) = (own.quantity, own.quantity_unit)`,
    ids,
  );
}

/** A verdict given since the readings were stored may rest on them, also on a lot that they are not of. */
async function oweLooks(tx: Transaction, intake: IntakeRow): Promise<void> {
  await tx.raw(
    `delete from lots_to_rejudge j using lot_channels lc
    where lc.channel_id = j.channel_id and lc.lot_id = j.lot_id and lc.first_at is null and j.channel_id = any(:channelIds)`,
    {
      channelIds: intake.channelIds ?? [],
    },
  );
  await tx.raw(
    `insert into lots_to_rejudge (plant_id, channel_id, lot_id, because)
     select v.plant_id, v.channel_id, v.lot_id, 'withdrawn' from verdicts v
     where v.channel_id = any(:channelIds) and v.is_current and (v.judged_at >= :since
       or exists (select 1 from undone u where u.channel_id = v.channel_id and u.lot_id = v.lot_id))
     on conflict do nothing`,
    { channelIds: intake.channelIds ?? [], since: intake.readingsStoredAt },
  );
}

/** What was drawn of baselines beyond the newest reading that is left; the rest is drawn anew when it is judged. */
async function dropDrawnEnds(tx: Transaction): Promise<void> {
  await tx.raw(
    `delete from baseline_points p using (
       select u.channel_id, (select max(lc.last_at) from lot_channels lc where lc.channel_id = u.channel_id) as last_at
       from (select distinct channel_id from undone) u
     ) e where p.channel_id = e.channel_id and (e.last_at is null or p.at > e.last_at)`,
  );
}

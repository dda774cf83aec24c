import { JOBS, type SettledChange } from '@app/contracts';
import { insertAuditEntry } from './audit';
import { updateInputsChanged } from './breaks';
import { type Queryable, rows, type Transaction } from './database';
import type { IntakeRow } from './intakes';
import { insertOwedJob } from './owed-jobs';
import type { Person } from './people';

/** A settled verdict that would be another one, as it was found. */
export interface FoundChange {
  channelId: number;
  lotId: number;
  /** The settled verdict; once another one is current, nothing is owed to it any more. */
  verdictId: number;
  now: string;
  would: string;
}

/** From when on settled verdicts of a channel may change by an intake's readings. */
export interface AffectedChannel {
  channelId: number;
  /** End of the first such lot, epoch seconds. */
  from: number;
}

/**
 * Channels on which an intake brought readings of lots that settled verdicts of other lots look at: lots that end at most half the longest
 * period after, and within the plan's window before that (see `timelineOf` in libs/scoring). Readings in the order of time have none.
 */
export function listAffectedChannels(db: Queryable, intakeId: number): Promise<AffectedChannel[]> {
  return rows<AffectedChannel>(
    db,
    `with plans as (
       select p.channel_id, (p.parameters->>'windowSeconds')::float8 as window_s,
         least((p.parameters->>'effectivePeriodSeconds')::float8, (p.parameters->>'windowSeconds')::float8) / 2 as reach_s
       from plan_revisions p where p.state = 'in_force' and p.channel_id in (select channel_id from intake_lots where intake_id = :intakeId)
     ), brought as (
       select b.channel_id, b.lot_id, lc.last_at from intake_lots b
       join lot_channels lc on lc.channel_id = b.channel_id and lc.lot_id = b.lot_id where b.intake_id = :intakeId and lc.last_at is not null
     )
     select p.channel_id as "channelId", extract(epoch from min(lc.last_at))::float8 as "from"
     from plans p join lot_channels lc on lc.channel_id = p.channel_id
     join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current and not v.is_provisional
     where not exists (select 1 from brought o where o.channel_id = lc.channel_id and o.lot_id = lc.lot_id)
       and exists (select 1 from brought b where b.channel_id = lc.channel_id
         and b.last_at between lc.last_at + make_interval(secs => p.reach_s - p.window_s) and lc.last_at + make_interval(secs => p.reach_s))
     group by p.channel_id order by p.channel_id`,
    { intakeId },
  );
}

export interface SettledVerdict {
  id: number;
  lotId: number;
  controlState: string;
  notScoredReason: string | null;
  score: number | null;
  specificationState: string;
}

/** The channel's settled verdicts on other lots than an intake's that end from an instant on; not those that are looked at again anyway. */
export function listSettledVerdicts(
  db: Queryable,
  { channelId, from }: AffectedChannel,
  intakeId: number,
): Promise<SettledVerdict[]> {
  return rows<SettledVerdict>(
    db,
    `select v.id, v.lot_id as "lotId", v.control_state as "controlState", v.not_scored_reason as "notScoredReason", v.score,
       v.specification_state as "specificationState"
     from verdicts v join lot_channels lc on lc.channel_id = v.channel_id and lc.lot_id = v.lot_id
     where v.channel_id = :channelId and v.is_current and not v.is_provisional and v.reading_count = lc.count
       and v.not_scored_reason is distinct from 'no_plan_in_force' and lc.last_at >= to_timestamp(:from)
       and not exists (select 1 from lots_to_rejudge j where j.channel_id = v.channel_id and j.lot_id = v.lot_id)
       and not exists (select 1 from intake_lots b where b.channel_id = v.channel_id and b.lot_id = v.lot_id and b.intake_id = :intakeId)
     order by lc.last_at, lc.lot_id`,
    { channelId, from, intakeId },
  );
}

export async function updateSettledChanges(tx: Transaction, intakeId: number, changes: FoundChange[]): Promise<void> {
  await tx('intakes')
    .where({ id: intakeId })
    .whereNot({ state: 'withdrawn' })
    .update({ settled_changes: JSON.stringify(changes) });
}

const CHANGES = `
  from intakes i cross join lateral jsonb_to_recordset(coalesce(i.settled_changes, '[]'))
    as s("channelId" bigint, "lotId" bigint, "verdictId" bigint, now text, would text)
  join verdicts v on v.id = s."verdictId" and v.is_current join lots l on l.id = s."lotId" join channels c on c.id = s."channelId"
  where i.id = :intakeId`;

/** Settled verdicts that would be another one by the intake's readings, and that nobody has had judged again since. */
export async function listSettledThatWouldChange(db: Queryable, intakeId: number): Promise<SettledChange[]> {
  const found = await rows<{
    lotId: number;
    lotNumber: string;
    channelId: number;
    channelName: string;
    now: string;
    would: string;
  }>(
    db,
    `select l.id as "lotId", l.number as "lotNumber", c.id as "channelId", c.name as "channelName", s.now, s.would ${CHANGES}
     order by l.starts_at, l.id, c.id`,
    { intakeId },
  );
  return found.map(({ channelId, channelName, ...change }) => ({
    ...change,
    channel: { id: channelId, name: channelName },
  }));
}

/**
 * Has the settled verdicts that would change judged again, as a person asks.
 * @returns the owed job's id, or null when none would change
 */
export async function requestRejudgeSettled(
  tx: Transaction,
  { intake, person, at }: { intake: IntakeRow; person: Person; at: Date },
): Promise<number | null> {
  const channels = await rows<{ id: number }>(tx, `select distinct c.id ${CHANGES} order by 1`, {
    intakeId: intake.id,
  });
  if (channels.length === 0) return null;
  const channelIds = channels.map(({ id }) => id);
  await tx.raw('select 1 from channels where id = any(:channelIds) order by id for update', { channelIds });
  const marked = await rows<{ lotId: number }>(
    tx,
    `insert into lots_to_rejudge (plant_id, channel_id, lot_id, because) select v.plant_id, v.channel_id, v.lot_id, 'asked' ${CHANGES}
     on conflict do nothing returning lot_id as "lotId"`,
    { intakeId: intake.id },
  );
  await updateInputsChanged(tx, channelIds);
  await insertAuditEntry(tx, {
    plantId: intake.plantId,
    at,
    actor: person,
    action: 'rejudge-settled',
    thingKind: 'intake',
    thingId: intake.id,
    sentence: `${person.name} asked Ebbline to judge again the settled verdicts on ${new Set(marked.map(({ lotId }) => lotId)).size} lots that the readings of ${intake.fileName} would change.`,
    after: { channelIds, verdicts: marked.length },
  });
  const subject = { intakeId: intake.id };
  return insertOwedJob(tx, { plantId: intake.plantId, name: JOBS.rejudgeSettled, subject, at });
}

/** Channels on which settled verdicts of an intake's list are owed another look. */
export async function listAskedChannelIds(db: Queryable, intakeId: number): Promise<number[]> {
  const found = await rows<{ id: number }>(
    db,
    `select distinct c.id ${CHANGES} and exists (select 1 from lots_to_rejudge j where j.channel_id = c.id and j.lot_id = l.id) order by 1`,
    { intakeId },
  );
  return found.map(({ id }) => id);
}

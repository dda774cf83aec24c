import { type Queryable, rows } from './database';

export interface IntakeNotes {
  /** Lots of the intake without a score now, by channel and reason; most first. */
  notScored: { channelId: number; channelName: string; reason: string; lots: number }[];
  /** Lots outside their control limits that were made before anybody approved the first plan of the channel: it holds none of those. */
  beforeFirstPlan: { id: number; number: string }[];
}

/** What an intake's lots are told of besides holds, as they stand now. */
export async function getIntakeNotes(db: Queryable, intakeId: number): Promise<IntakeNotes> {
  const notScored = await rows<IntakeNotes['notScored'][number]>(
    db,
    `select c.id as "channelId", c.name as "channelName", coalesce(v.not_scored_reason, 'not_judged') as reason, count(*)::int as lots
     from intake_lots i join channels c on c.id = i.channel_id
     left join verdicts v on v.channel_id = i.channel_id and v.lot_id = i.lot_id and v.is_current
     where i.intake_id = :intakeId and v.score is null group by c.id, reason order by lots desc, c.name, reason`,
    { intakeId },
  );
  const beforeFirstPlan = await rows<IntakeNotes['beforeFirstPlan'][number]>(
    db,
    `select distinct l.id, l.number, l.starts_at
     from intake_lots i join lots l on l.id = i.lot_id
     join verdicts v on v.channel_id = i.channel_id and v.lot_id = i.lot_id and v.is_current and v.control_state = 'outside_control_limits'
     where i.intake_id = :intakeId and not exists (select 1 from holds h where h.lot_id = l.id)
       and l.ends_at <= (select min(p.approved_at) from plan_revisions p where p.channel_id = i.channel_id)
     order by l.starts_at, l.id`,
    { intakeId },
  );
  return { notScored, beforeFirstPlan: beforeFirstPlan.map(({ id, number }) => ({ id, number })) };
}

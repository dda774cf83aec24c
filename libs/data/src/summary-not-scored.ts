import { notScoredSentence, type SummaryNotScored } from '@app/contracts';
import { type Queryable, rows } from './database';
import { type TwoWeeks, weekBindings, WEEKS } from './summary-weeks-sql';

interface NotScoredRow {
  lineId: number;
  lineName: string;
  channelId: number;
  channelName: string;
  reason: string;
  lots: number;
  lastWeekLots: number;
}

/** Lots of the week without a score on a channel, counted by channel and reason; most first. */
export async function listSummaryNotScored(
  db: Queryable,
  plantId: number,
  weeks: TwoWeeks,
): Promise<SummaryNotScored[]> {
  const found = await rows<NotScoredRow>(
    db,
    `with ${WEEKS}
     select n.id as "lineId", n.name as "lineName", c.id as "channelId", c.name as "channelName", coalesce(v.not_scored_reason, 'not_judged') as reason,
       (count(*) filter (where w.week = 0))::int as lots, (count(*) filter (where w.week = 1))::int as "lastWeekLots"
     from weeks w join lines n on n.plant_id = :plantId
     join lots l on l.line_id = n.id and l.ends_at >= w.from_at and l.ends_at < w.to_at
     join lot_channels lc on lc.lot_id = l.id and lc.first_at is not null join channels c on c.id = lc.channel_id
     left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
     where v.score is null group by n.id, c.id, reason having count(*) filter (where w.week = 0) > 0
     order by lots desc, n.name, c.name, reason`,
    { plantId, ...weekBindings(weeks) },
  );
  return found.map((row) => ({
    line: { id: row.lineId, name: row.lineName },
    channel: { id: row.channelId, name: row.channelName },
    reason: row.reason,
    sentence: notScoredSentence(row.reason),
    lots: row.lots,
    lastWeekLots: row.lastWeekLots,
  }));
}

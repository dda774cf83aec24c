import type { BreakKind } from '@app/contracts';
import { type Queryable, rows } from './database';
import { columnSeconds, type RecordSpan } from './record-span';

export interface BreakRow {
  id: number;
  at: Date;
  kind: BreakKind;
  reason: string;
  byName: string;
}

/** The channel's breaks in a stretch, but for those corrected or withdrawn. */
export function listBreaks(db: Queryable, channelId: number, from: Date, to: Date): Promise<BreakRow[]> {
  return rows<BreakRow>(
    db,
    `select b.id, b.at, b.kind, b.reason, p.name as "byName" from breaks b join people p on p.id = b.declared_by
     where b.channel_id = :channelId and b.at between :from and :to and not b.is_withdrawn
       and not exists (select 1 from breaks c where c.corrects_id = b.id) order by b.at, b.id`,
    { channelId, from, to },
  );
}

export interface BaselinePointRow {
  at: Date;
  value: number;
  standardError: number;
  /** Counts up at each break: points of unlike segments are not joined. */
  segment: number;
}

/**
 * The drawn baseline in a stretch, thinned to the first and last point of each column and segment, with the next point on
 * either side so that the line runs to the edges.
 */
export function listBaselinePoints(db: Queryable, span: RecordSpan, breaks: Date[]): Promise<BaselinePointRow[]> {
  const bounds = ['-infinity', ...breaks.map((at) => at.toISOString())];
  return rows<BaselinePointRow>(
    db,
    `with shown as (
       select at, value, standard_error from baseline_points where channel_id = :channelId
         and at >= coalesce((select max(at) from baseline_points where channel_id = :channelId and at < :from), :from)
         and at <= coalesce((select min(at) from baseline_points where channel_id = :channelId and at > :to), :to)
     ), placed as (
       select *, floor(extract(epoch from at - cast(:from as timestamptz)) / :seconds) as col,
         width_bucket(at, cast(:bounds as timestamptz[])) as segment from shown
     ), ranked as (
       select *, row_number() over (partition by col, segment order by at) as forward,
         row_number() over (partition by col, segment order by at desc) as backward from placed
     )
     select at, value, standard_error as "standardError", segment from ranked where forward = 1 or backward = 1 order by at`,
    { ...span, seconds: columnSeconds(span), bounds },
  );
}

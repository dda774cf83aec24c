import { findRow, type Queryable } from './database';

/** A stretch of a channel's record, as drawn: so many columns of pixels from one instant to another. */
export interface RecordSpan {
  channelId: number;
  from: Date;
  to: Date;
  columnCount: number;
}

/** A lot's readings span less than this; it lets an index find the lots of a stretch by their first reading. */
export const LONGEST_LOT = '31 days';

export const columnSeconds = (span: RecordSpan) => (span.to.getTime() - span.from.getTime()) / 1000 / span.columnCount;

/** First and last reading of the channel; undefined when it has none. */
export async function findRecordExtent(
  db: Queryable,
  channelId: number,
): Promise<{ first: Date; last: Date } | undefined> {
  const row = await findRow<{ first: Date | null; last: Date | null }>(
    db,
    `select (select measured_at from readings where channel_id = :channelId and superseded_by is null and withdrawn_at is null order by measured_at limit 1) as first,
       (select measured_at from readings where channel_id = :channelId and superseded_by is null and withdrawn_at is null order by measured_at desc limit 1) as last`,
    { channelId },
  );
  return row?.first && row.last ? { first: row.first, last: row.last } : undefined;
}

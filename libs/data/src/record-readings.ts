import { findRow, type Queryable, rows } from './database';
import { columnSeconds, LONGEST_LOT, type RecordSpan } from './record-span';

/** Beyond so many readings the raw rows are not read; what their lots' least and greatest come to is. */
export const MOST_RAW_READINGS = 150_000;

/** Least and greatest deviation from nominal in a column; columns without a reading are absent. */
export interface ReadingColumn {
  column: number;
  low: number;
  high: number;
}

/**
 * The readings of a stretch, a column of pixels each. A short stretch is read reading by reading. A long one is answered from
 * lot_channels, where a column shows the least and greatest of the lots that it cuts: where a lot is wider than a column, each
 * of its columns shows the whole lot's. Either way the answer has at most `columnCount` entries.
 */
export async function listReadingColumns(
  db: Queryable,
  span: RecordSpan,
  fallbackNominal: number,
  mostRaw: number = MOST_RAW_READINGS,
): Promise<ReadingColumn[]> {
  const bindings = { ...span, fallbackNominal, seconds: columnSeconds(span), longestLot: LONGEST_LOT };
  const sum = await findRow<{ total: number | null }>(
    db,
    `select sum(count) as total from lot_channels where channel_id = :channelId
       and first_at between cast(:from as timestamptz) - cast(:longestLot as interval) and :to and last_at >= :from`,
    bindings,
  );
  return rows<ReadingColumn>(db, Number(sum?.total ?? 0) <= mostRaw ? FROM_READINGS : FROM_LOTS, bindings);
}

const columnOf = (instant: string) =>
  `greatest(0, least(:columnCount - 1, floor(extract(epoch from ${instant} - cast(:from as timestamptz)) / :seconds)))::int`;

const FROM_READINGS = `
  select ${columnOf('r.measured_at')} as "column", min(r.value - coalesce(s.nominal, :fallbackNominal)) as low,
    max(r.value - coalesce(s.nominal, :fallbackNominal)) as high
  from readings r join lot_channels lc on lc.channel_id = r.channel_id and lc.lot_id = r.lot_id
  left join specifications s on s.id = lc.specification_id
  where r.channel_id = :channelId and r.superseded_by is null and r.withdrawn_at is null and r.measured_at between :from and :to and r.value is not null
  group by 1 order by 1`;

const FROM_LOTS = `
  select k as "column", min(lc.minimum - coalesce(s.nominal, :fallbackNominal)) as low,
    max(lc.maximum - coalesce(s.nominal, :fallbackNominal)) as high
  from lot_channels lc left join specifications s on s.id = lc.specification_id
  cross join lateral generate_series(${columnOf('lc.first_at')}, ${columnOf('lc.last_at')}) as k
  where lc.channel_id = :channelId and lc.minimum is not null
    and lc.first_at between cast(:from as timestamptz) - cast(:longestLot as interval) and :to and lc.last_at >= :from
  group by k order by k`;

import { type Queryable, rows } from './database';
import { LONGEST_LOT, type RecordSpan } from './record-span';

/** A record shows at most so many lots; of more, those that stand out stay and the others are thinned evenly. */
export const MOST_RECORD_LOTS = 6_000;

export interface RecordLotRow {
  id: number;
  number: string;
  product: string;
  startsAt: Date;
  endsAt: Date;
  at: Date;
  mean: number | null;
  nominal: number;
  lower: number | null;
  upper: number | null;
  baseline: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  score: number | null;
  /** Lots of the stretch, of which these may be a part. */
  total: number;
}

/** The lots with readings in a stretch of a channel's record, with their current verdict's figures. */
export function listRecordLots(
  db: Queryable,
  span: Pick<RecordSpan, 'channelId' | 'from' | 'to'>,
  fallbackNominal: number,
  most: number = MOST_RECORD_LOTS,
): Promise<RecordLotRow[]> {
  return rows<RecordLotRow>(
    db,
    `with found as (
       select lc.lot_id, lc.first_at, coalesce(lc.mean_at, lc.first_at + (lc.last_at - lc.first_at) / 2) as at, lc.mean,
         lc.specification_id, v.baseline, v.control_low, v.control_high, v.score,
         coalesce(v.control_state <> 'within_control_limits' or v.specification_state = 'outside_specification', false)
           or exists (select 1 from holds h where h.lot_id = lc.lot_id and h.state <> 'withdrawn') as stands_out
       from lot_channels lc left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
       where lc.channel_id = :channelId and lc.last_at >= :from
         and lc.first_at between cast(:from as timestamptz) - cast(:longestLot as interval) and :to
     ), ranked as (
       select *, count(*) over () as total, row_number() over (partition by stands_out order by first_at, lot_id) as place from found
     )
     select l.id, l.number, p.code as product, l.starts_at as "startsAt", l.ends_at as "endsAt", r.at, r.mean,
       coalesce(s.nominal, :fallbackNominal) as nominal, s.lower, s.upper, r.baseline, r.control_low as "controlLow",
       r.control_high as "controlHigh", r.score, r.total
     from ranked r join lots l on l.id = r.lot_id join products p on p.id = l.product_id
     left join specifications s on s.id = r.specification_id
     where r.stands_out or r.place % cast(ceil(r.total::float8 / :most) as bigint) = 0
     order by r.at, l.id limit :hardLimit`,
    { ...span, fallbackNominal, most, longestLot: LONGEST_LOT, hardLimit: 2 * most },
  );
}

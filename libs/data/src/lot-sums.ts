import type { Transaction } from './database';
import { inForce } from './incoming-readings';

/**
 * What each touched lot comes to on each touched channel, with its sixteen time blocks and the specification of its start. The readings
 * are looked up lot by lot through the identity index inside one statement: joined as a set, fresh tables mislead the planner.
 * @param pairs a query of distinct channel_id, lot_id; the lots' spans hold all of their readings
 */
export async function updateLotChannels(
  tx: Transaction,
  pairs: string,
  bindings: Record<string, unknown> = {},
): Promise<void> {
  await tx.raw(
    `create temporary table touched on commit drop as
     select i.channel_id, i.lot_id, l.starts_at, l.ends_at, s.id as specification_id, s.lower, s.upper
     from (${pairs}) i
     join lots l on l.id = i.lot_id join channels c on c.id = i.channel_id
     left join specifications s on s.product_id = l.product_id and s.characteristic_id = c.characteristic_id and s.valid @> l.starts_at`,
    bindings,
  );
  await tx.raw('analyze touched');
  await tx.raw(
    `update lot_channels lc set count = w.count, censored_low = w.censored_low, censored_high = w.censored_high, first_at = w.first_at,
       last_at = w.last_at, mean_at = w.mean_at, mean = w.mean, sum_squares = w.sum_squares, minimum = w.minimum, maximum = w.maximum,
       count_below = w.count_below, count_above = w.count_above, specification_id = t.specification_id, blocks = w.blocks
     from touched t cross join lateral (
       with active as materialized (
         select r.value, r.censoring, r.measured_at, date_part('epoch', r.measured_at) as at from readings r
         where r.channel_id = t.channel_id and r.measured_at between t.starts_at and t.ends_at and r.lot_id = t.lot_id and ${inForce('r')}
       ), span as materialized (
         select min(at) as first_at, nullif(max(at) - min(at), 0) as length from active
       ), blocks as (
         select least(15, coalesce(floor(16 * (a.at - s.first_at) / s.length), 0))::integer as block, count(*) as count, avg(a.at) as at,
           avg(a.value) as mean, var_pop(a.value) * count(*) as sum_squares
         from active a cross join span s where a.value is not null group by 1
       )
       select count(value) as count, count(*) filter (where censoring = 'below') as censored_low,
         count(*) filter (where censoring = 'above') as censored_high, min(measured_at) as first_at, max(measured_at) as last_at,
         to_timestamp(avg(at) filter (where value is not null)) as mean_at, avg(value) as mean, var_pop(value) * count(value) as sum_squares,
         min(value) as minimum, max(value) as maximum, count(*) filter (where value < t.lower) as count_below,
         count(*) filter (where value > t.upper) as count_above,
         (select jsonb_agg(jsonb_build_object('index', block, 'at', b.at, 'count', b.count, 'mean', b.mean, 'sumSquares', b.sum_squares) order by block)
          from blocks b) as blocks
       from active
     ) w
     where lc.channel_id = t.channel_id and lc.lot_id = t.lot_id`,
  );
  await tx.raw('drop table touched');
}

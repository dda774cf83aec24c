import { rows, type Transaction } from './database';
import { type IntakeProblemRow, insertIntakeProblems } from './intakes';

/**
 * Moves an intake's staged readings into `readings`, set by set, never a query per row: lots and their places are made, readings that
 * are there already change nothing and are counted, and what each touched lot comes to on each channel is worked out again.
 */

export interface StoredReadings {
  channelIds: number[];
  lotIds: number[];
  rowsUsed: number;
  rowsAlreadyThere: number;
  rowsNotUsed: number;
  readingsStored: number;
  readingsAlreadyThere: number;
}

const MAX_LISTED = 500;

/** So that the readings of a large workbook are sorted in memory. */
const SORT_MEMORY_MB = 64;

export async function storeReadings(
  tx: Transaction,
  intake: { id: number; plantId: number; lineId: number; rowsRead: number },
): Promise<StoredReadings> {
  await tx.raw(`select pg_advisory_xact_lock(hashtext('store readings'), cast(:lineId as integer))`, {
    lineId: intake.lineId,
  });
  await tx.raw(`set local work_mem = '${SORT_MEMORY_MB}MB'`);
  const ids: Ids = { intakeId: intake.id, plantId: intake.plantId, lineId: intake.lineId };
  await makeLots(tx, ids);
  await gatherIncoming(tx, ids);
  await tellDropped(tx, ids);
  await tellDiffering(tx, ids);
  await insertReadings(tx, ids);
  await updateLotSpans(tx, ids);
  await updateLotChannels(tx);
  const counts = await countRows(tx);
  const [touched] = await rows<{ channelIds: number[]; lotIds: number[] }>(
    tx,
    `select coalesce(array_agg(distinct channel_id), '{}') as "channelIds", coalesce(array_agg(distinct lot_id), '{}') as "lotIds"
     from incoming where ${IS_NEW}`,
  );
  const channelIds = touched.channelIds.map(Number);
  await tx.raw('select 1 from channels where id = any(:channelIds) order by id for update', { channelIds });
  await tx.raw('update channels set inputs_version = inputs_version + 1 where id = any(:channelIds)', { channelIds });
  await tx('staged_readings').where({ intake_id: intake.id }).delete();
  await tx.raw('drop table incoming');
  return {
    channelIds,
    lotIds: touched.lotIds.map(Number),
    rowsUsed: counts.rowsUsed,
    rowsAlreadyThere: counts.rowsAlreadyThere,
    rowsNotUsed: intake.rowsRead - counts.rowsUsed - counts.rowsAlreadyThere,
    readingsStored: counts.readingsStored,
    readingsAlreadyThere: counts.readingsAlreadyThere,
  };
}

type Ids = { intakeId: number; plantId: number; lineId: number };

/** Of a row of `incoming`: it is stored now. */
const IS_NEW = 'not is_there and drop_code is null';

/** What the first row that gives a quantity says, with its unit; none where the workbook names none. Nothing is a lot of 0. */
const FIRST_QUANTITY = `
  (array_agg(quantity order by ordinal) filter (where quantity > 0))[1] as quantity,
  (array_agg(coalesce(quantity_unit, '') order by ordinal) filter (where quantity > 0))[1] as quantity_unit`;

/**
 * Makes the lots that are new. The first row that names a product says the lot's; rows that name another are none of it. Rows alike but for
 * time are gathered first, so that only some few a lot are put in order.
 */
async function makeLots(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `with alike as (
       select lot, product, quantity, quantity_unit, min(ordinal) as ordinal, min(measured_at) as starts_at, max(measured_at) as ends_at
       from staged_readings where intake_id = :intakeId group by lot, product, quantity, quantity_unit
     ), known as (
       select a.*, p.id as product_id, first_value(p.id) over (partition by a.lot order by p.id is null, a.ordinal) as lot_product_id
       from alike a left join products p on p.plant_id = :plantId and p.code = a.product
     )
     insert into lots (plant_id, line_id, number, product_id, quantity, quantity_unit, starts_at, ends_at)
     select :plantId, :lineId, lot, lot_product_id, ${FIRST_QUANTITY}, min(starts_at), max(ends_at)
     from known where lot_product_id is not null and (product_id is null or product_id = lot_product_id)
     group by lot, lot_product_id
     on conflict (line_id, number, run) do nothing`,
    ids,
  );
}

/**
 * The staged readings with their lots, occurrence numbers, what is stored already, and why a reading cannot be used: no product for a new
 * lot, another product than the lot has, a serial or position said twice at one instant. Occurrence counts equal stamps by the order of rows.
 */
async function gatherIncoming(tx: Transaction, ids: Ids): Promise<void> {
  const [span] = await rows<{ channelIds: number[]; from: Date; to: Date }>(
    tx,
    `select array_agg(distinct channel_id) as "channelIds", min(measured_at) as "from", max(measured_at) as "to"
     from staged_readings where intake_id = :intakeId`,
    ids,
  );
  await tx.raw(
    `create temporary table incoming on commit drop as
     with known_lots as (
       select distinct on (number) id, number, product_id from lots
       where line_id = :lineId and number in (select lot from staged_readings where intake_id = :intakeId)
       order by number, run desc
     ), staged as (
       select s.ordinal, s.sheet, s."row", s."column", s.lot, p.id as product_id, s.product as product_text, s.quantity, s.quantity_unit,
         s.channel_id, s.measured_at, s.value, s.censoring, coalesce(s.serial, '') as serial, coalesce(s.position, '') as position,
         row_number() over (partition by s.channel_id, s.measured_at, s.lot, coalesce(s.serial, ''), coalesce(s.position, '')
           order by s.ordinal)::integer as occurrence
       from staged_readings s left join products p on p.plant_id = :plantId and p.code = s.product
       where s.intake_id = :intakeId
     ), placed as (
       select s.*, l.id as lot_id, case when l.id is null then 'product-missing' when s.product_id <> l.product_id then 'product-differs'
           when s.occurrence > 1 and (s.serial <> '' or s.position <> '') then 'repeated-in-file' end as drop_code
       from staged s left join known_lots l on l.number = s.lot
     )
     select i.*, r.id is not null as is_there, r.value as stored_value, r.censoring as stored_censoring
     from placed i left join readings r on i.drop_code is null and r.superseded_by is null and r.channel_id = i.channel_id
       and r.measured_at = i.measured_at and r.lot_id = i.lot_id and r.serial = i.serial and r.position = i.position
       and r.occurrence = i.occurrence and r.channel_id = any(:channelIds) and r.measured_at between :from and :to`,
    { ...ids, channelIds: span.channelIds ?? [], from: span.from, to: span.to },
  );
  await tx.raw('analyze incoming (channel_id, lot_id, measured_at)');
}

/** Says of each reading that could not be used why not. */
async function tellDropped(tx: Transaction, ids: Ids): Promise<void> {
  const dropped = await rows<IntakeProblemRow & { lot: string; product: string | null; known: string | null }>(
    tx,
    `select i.sheet, i."row", i."column", i.drop_code as code, i.lot, i.product_text as product, p.code as known
     from incoming i left join lots l on l.id = i.lot_id left join products p on p.id = l.product_id
     where i.drop_code is not null order by i.ordinal limit ${MAX_LISTED}`,
  );
  const details: Record<string, (row: (typeof dropped)[number]) => string> = {
    'product-missing': (row) =>
      `Lot ${row.lot} is new and no row of it names its product. Add the product and upload again.`,
    'product-differs': (row) =>
      `Lot ${row.lot} is product ${row.known}, this row says ${row.product}. The reading was not stored; put the lot or the product right and upload again.`,
    'repeated-in-file': (row) =>
      `Lot ${row.lot} has this serial or position at this time twice. The first reading stands; put the time or the serial right and upload again.`,
  };
  await insertIntakeProblems(
    tx,
    ids.plantId,
    ids.intakeId,
    dropped.map((row) => ({
      sheet: row.sheet,
      row: row.row,
      column: row.column,
      code: row.code,
      detail: details[row.code](row),
      severity: 'cell_not_used' as const,
    })),
  );
}

/** Where a stored value differs from the workbook's, it stands and the difference is said. */
async function tellDiffering(tx: Transaction, ids: Ids): Promise<void> {
  const differing = await rows<{ sheet: string; row: number; column: string; stored: string; incoming: string }>(
    tx,
    `select sheet, "row", "column", coalesce(stored_value::text, 'off scale ' || stored_censoring) as stored,
       coalesce(value::text, 'off scale ' || censoring) as incoming
     from incoming where is_there and (stored_value, stored_censoring) is distinct from (value, censoring) order by ordinal limit ${MAX_LISTED}`,
  );
  await insertIntakeProblems(
    tx,
    ids.plantId,
    ids.intakeId,
    differing.map((row) => ({
      sheet: row.sheet,
      row: row.row,
      column: row.column,
      code: 'stored-value-differs',
      detail: `This reading is stored already as ${row.stored}; the workbook says ${row.incoming}. The stored value stands.`,
      severity: 'cell_not_used' as const,
    })),
  );
}

async function insertReadings(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `insert into lot_channels (plant_id, line_id, channel_id, lot_id)
     select distinct cast(:plantId as bigint), cast(:lineId as bigint), channel_id, lot_id from incoming where ${IS_NEW}
     on conflict do nothing`,
    ids,
  );
  await tx.raw(
    `insert into intake_lots (plant_id, channel_id, lot_id, intake_id)
     select distinct cast(:plantId as bigint), channel_id, lot_id, cast(:intakeId as bigint) from incoming where ${IS_NEW}`,
    ids,
  );
  await tx.raw(
    `insert into readings (plant_id, channel_id, lot_id, intake_id, measured_at, value, censoring, occurrence, serial, position)
     select :plantId, channel_id, lot_id, :intakeId, measured_at, value, censoring, occurrence, serial, position
     from incoming where ${IS_NEW} order by channel_id, measured_at`,
    ids,
  );
}

async function updateLotSpans(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `update lots l set starts_at = least(l.starts_at, n.starts_at), ends_at = greatest(l.ends_at, n.ends_at),
       quantity = coalesce(l.quantity, n.quantity), quantity_unit = coalesce(l.quantity_unit, n.quantity_unit)
     from (
       select lot_id, min(measured_at) as starts_at, max(measured_at) as ends_at, ${FIRST_QUANTITY}
       from incoming where ${IS_NEW} group by lot_id
     ) n where l.id = n.lot_id and l.plant_id = :plantId`,
    ids,
  );
}

/**
 * What each touched lot comes to on each touched channel, with its sixteen time blocks and the specification of its start. The readings
 * are looked up lot by lot through the identity index inside one statement: joined as a set, fresh tables mislead the planner.
 */
async function updateLotChannels(tx: Transaction): Promise<void> {
  await tx.raw(
    `create temporary table touched on commit drop as
     select i.channel_id, i.lot_id, l.starts_at, l.ends_at, s.id as specification_id, s.lower, s.upper
     from (select distinct channel_id, lot_id from incoming where ${IS_NEW}) i
     join lots l on l.id = i.lot_id join channels c on c.id = i.channel_id
     left join specifications s on s.product_id = l.product_id and s.characteristic_id = c.characteristic_id and s.valid @> l.starts_at`,
  );
  await tx.raw('analyze touched');
  await tx.raw(
    `update lot_channels lc set count = w.count, censored_low = w.censored_low, censored_high = w.censored_high, first_at = w.first_at,
       last_at = w.last_at, mean_at = w.mean_at, mean = w.mean, sum_squares = w.sum_squares, minimum = w.minimum, maximum = w.maximum,
       count_below = w.count_below, count_above = w.count_above, specification_id = t.specification_id, blocks = w.blocks
     from touched t cross join lateral (
       with active as materialized (
         select r.value, r.censoring, r.measured_at, date_part('epoch', r.measured_at) as at from readings r
         where r.channel_id = t.channel_id and r.measured_at between t.starts_at and t.ends_at and r.lot_id = t.lot_id and r.superseded_by is null
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

/** A sheet's row is used when it brought a reading, already there when all that it brings is there. */
async function countRows(tx: Transaction) {
  const [counts] = await rows<{
    rowsUsed: number;
    rowsAlreadyThere: number;
    readingsStored: number;
    readingsAlreadyThere: number;
  }>(
    tx,
    `select count(*) filter (where stored > 0) as "rowsUsed", count(*) filter (where stored = 0 and there > 0) as "rowsAlreadyThere",
       coalesce(sum(stored), 0)::bigint as "readingsStored", coalesce(sum(there), 0)::bigint as "readingsAlreadyThere"
     from (
       select count(*) filter (where ${IS_NEW}) as stored, count(*) filter (where is_there) as there
       from incoming group by sheet, "row"
     ) by_row`,
  );
  return counts;
}

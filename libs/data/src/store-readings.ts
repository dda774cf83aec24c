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

export async function storeReadings(
  tx: Transaction,
  intake: { id: number; plantId: number; lineId: number; rowsRead: number },
): Promise<StoredReadings> {
  const ids = { intakeId: intake.id, plantId: intake.plantId, lineId: intake.lineId };
  await tx.raw(`select pg_advisory_xact_lock(hashtext('store readings'), cast(:lineId as integer))`, ids);
  await gatherIncoming(tx, ids);
  await makeLots(tx, ids);
  await dropUnusable(tx, ids);
  await findAlreadyThere(tx, ids);
  await insertReadings(tx, ids);
  await updateLotSpans(tx, ids);
  await updateLotChannels(tx);
  const counts = await countRows(tx);
  const touched = await rows<{ channelIds: number[]; lotIds: number[] }>(
    tx,
    `select coalesce(array_agg(distinct channel_id), '{}') as "channelIds", coalesce(array_agg(distinct lot_id), '{}') as "lotIds"
     from incoming where not is_there and drop_code is null`,
  );
  await tx.raw(
    `select 1 from channels where id in (select channel_id from incoming where not is_there and drop_code is null) order by id for update`,
  );
  await tx.raw(
    `update channels set inputs_version = inputs_version + 1
     where id in (select distinct channel_id from incoming where not is_there and drop_code is null)`,
  );
  await tx('staged_readings').where({ intake_id: intake.id }).delete();
  const stored: StoredReadings = {
    channelIds: touched[0].channelIds.map(Number),
    lotIds: touched[0].lotIds.map(Number),
    rowsUsed: counts.rowsUsed,
    rowsAlreadyThere: counts.rowsAlreadyThere,
    rowsNotUsed: intake.rowsRead - counts.rowsUsed - counts.rowsAlreadyThere,
    readingsStored: counts.readingsStored,
    readingsAlreadyThere: counts.readingsAlreadyThere,
  };
  await tx.raw('drop table incoming');
  return stored;
}

type Ids = { intakeId: number; plantId: number; lineId: number };

/** The staged readings with their occurrence numbers and products. Occurrence counts equal stamps by the order of rows, unless a serial or position tells them apart. */
async function gatherIncoming(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `create temporary table incoming on commit drop as
     select s.ordinal, s.sheet, s."row", s."column", s.lot, p.id as product_id, s.product as product_text, s.quantity, s.quantity_unit,
       s.channel_id, s.measured_at, s.value, s.censoring, coalesce(s.serial, '') as serial, coalesce(s.position, '') as position,
       row_number() over (partition by s.channel_id, s.measured_at, s.lot, coalesce(s.serial, ''), coalesce(s.position, '') order by s.ordinal)::integer as occurrence,
       null::bigint as lot_id, false as is_there, null::text as drop_code
     from staged_readings s left join products p on p.plant_id = :plantId and p.code = s.product
     where s.intake_id = :intakeId`,
    ids,
  );
  await tx.raw('analyze incoming');
}

/** What the first row that gives a quantity says, with its unit; none where the workbook names none. Nothing is a lot of 0. */
const FIRST_QUANTITY = `
  (array_agg(quantity order by ordinal) filter (where quantity > 0))[1] as quantity,
  (array_agg(coalesce(quantity_unit, '') order by ordinal) filter (where quantity > 0))[1] as quantity_unit`;

/** Makes the lots that are new. The first row of a lot says its product and quantity. */
async function makeLots(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `insert into lots (plant_id, line_id, number, product_id, quantity, quantity_unit, starts_at, ends_at)
     select :plantId, :lineId, i.lot, f.product_id, ${FIRST_QUANTITY}, min(i.measured_at), max(i.measured_at)
     from incoming i join (
       select lot, (array_agg(product_id order by ordinal) filter (where product_id is not null))[1] as product_id from incoming group by lot
     ) f on f.lot = i.lot and (i.product_id is null or i.product_id = f.product_id)
     where f.product_id is not null group by i.lot, f.product_id
     on conflict (line_id, number, run) do nothing`,
    ids,
  );
  await tx.raw(
    `update incoming i set lot_id = l.id from lots l
     where l.line_id = :lineId and l.number = i.lot
       and l.run = (select max(run) from lots n where n.line_id = :lineId and n.number = i.lot)`,
    ids,
  );
}

/** Marks what cannot be used and says why: no product for a new lot, another product than the lot has, a serial said twice at one instant. */
async function dropUnusable(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `update incoming i set drop_code = case
         when i.lot_id is null then 'product-missing'
         when i.product_id is not null and i.product_id <> l.product_id then 'product-differs'
         else 'repeated-in-file' end
     from incoming j left join lots l on l.id = j.lot_id
     where i.ordinal = j.ordinal and (i.lot_id is null or (i.product_id is not null and i.product_id <> l.product_id)
       or (i.occurrence > 1 and (i.serial <> '' or i.position <> '')))`,
  );
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

/** Marks readings that are there already; where the stored value differs, it stands and the difference is said. */
async function findAlreadyThere(tx: Transaction, ids: Ids): Promise<void> {
  const differing = await rows<{ sheet: string; row: number; column: string; stored: string; incoming: string }>(
    tx,
    `with known as (
       update incoming i set is_there = true from readings r
       where i.drop_code is null and r.superseded_by is null and r.channel_id = i.channel_id and r.measured_at = i.measured_at
         and r.lot_id = i.lot_id and r.serial = i.serial and r.position = i.position and r.occurrence = i.occurrence
       returning i.ordinal, i.sheet, i."row", i."column", i.value as new_value, i.censoring as new_censoring, r.value, r.censoring
     )
     select sheet, "row", "column", coalesce(value::text, 'off scale ' || censoring) as stored,
       coalesce(new_value::text, 'off scale ' || new_censoring) as incoming
     from known where (value, censoring) is distinct from (new_value, new_censoring) order by ordinal limit ${MAX_LISTED}`,
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
     select distinct cast(:plantId as bigint), cast(:lineId as bigint), channel_id, lot_id from incoming where not is_there and drop_code is null
     on conflict do nothing`,
    ids,
  );
  await tx.raw(
    `insert into readings (plant_id, channel_id, lot_id, intake_id, measured_at, value, censoring, occurrence, serial, position)
     select :plantId, channel_id, lot_id, :intakeId, measured_at, value, censoring, occurrence, serial, position
     from incoming where not is_there and drop_code is null order by channel_id, measured_at`,
    ids,
  );
}

async function updateLotSpans(tx: Transaction, ids: Ids): Promise<void> {
  await tx.raw(
    `update lots l set starts_at = least(l.starts_at, n.starts_at), ends_at = greatest(l.ends_at, n.ends_at),
       quantity = coalesce(l.quantity, n.quantity), quantity_unit = coalesce(l.quantity_unit, n.quantity_unit)
     from (
       select lot_id, min(measured_at) as starts_at, max(measured_at) as ends_at, ${FIRST_QUANTITY}
       from incoming where not is_there and drop_code is null group by lot_id
     ) n where l.id = n.lot_id and l.plant_id = :plantId`,
    ids,
  );
}

/** What each touched lot comes to on each touched channel, with its sixteen time blocks and the specification of its start. */
async function updateLotChannels(tx: Transaction): Promise<void> {
  await tx.raw(
    `with touched as (
       select distinct i.channel_id, i.lot_id, l.starts_at, l.ends_at, s.id as specification_id, s.lower, s.upper
       from incoming i join lots l on l.id = i.lot_id join channels c on c.id = i.channel_id
       left join specifications s on s.product_id = l.product_id and s.characteristic_id = c.characteristic_id and s.valid @> l.starts_at
       where not i.is_there and i.drop_code is null
     ), active as (
       select t.channel_id, t.lot_id, t.specification_id, t.lower, t.upper, r.value, r.censoring, r.measured_at,
         extract(epoch from r.measured_at)::float8 as at,
         min(r.measured_at) over lot as first_at, max(r.measured_at) over lot as last_at
       from touched t join readings r on r.channel_id = t.channel_id and r.lot_id = t.lot_id and r.superseded_by is null
         and r.measured_at between t.starts_at and t.ends_at
       window lot as (partition by t.channel_id, t.lot_id)
     ), blocks as (
       select channel_id, lot_id, block, jsonb_build_object('index', block, 'at', avg(at), 'count', count(*), 'mean', avg(value),
         'sumSquares', coalesce(var_pop(value), 0) * count(*)) as figures
       from (
         select *, case when last_at > first_at then
             least(15, floor(16 * extract(epoch from measured_at - first_at) / extract(epoch from last_at - first_at))::integer) else 0 end as block
         from active where value is not null
       ) b group by channel_id, lot_id, block
     ), whole as (
       select channel_id, lot_id, specification_id, count(value) as count,
         count(*) filter (where censoring = 'below') as censored_low, count(*) filter (where censoring = 'above') as censored_high,
         min(measured_at) as first_at, max(measured_at) as last_at, to_timestamp(avg(at) filter (where value is not null)) as mean_at,
         avg(value) as mean, var_pop(value) * count(value) as sum_squares, min(value) as minimum, max(value) as maximum,
         count(*) filter (where value < lower) as count_below, count(*) filter (where value > upper) as count_above
       from active group by channel_id, lot_id, specification_id
     )
     update lot_channels lc set count = w.count, censored_low = w.censored_low, censored_high = w.censored_high, first_at = w.first_at,
       last_at = w.last_at, mean_at = w.mean_at, mean = w.mean, sum_squares = w.sum_squares, minimum = w.minimum, maximum = w.maximum,
       count_below = w.count_below, count_above = w.count_above, specification_id = w.specification_id,
       blocks = (select jsonb_agg(b.figures order by b.block) from blocks b where b.channel_id = w.channel_id and b.lot_id = w.lot_id)
     from whole w where lc.channel_id = w.channel_id and lc.lot_id = w.lot_id`,
  );
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
       select count(*) filter (where not is_there and drop_code is null) as stored, count(*) filter (where is_there) as there
       from incoming group by sheet, "row"
     ) by_row`,
  );
  return counts;
}

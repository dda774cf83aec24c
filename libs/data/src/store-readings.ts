import { updateInputsChanged } from './breaks';
import { rows, type Transaction } from './database';
import { DIFFERS, gatherIncoming, type IntakePlace, IS_NEW, lockLineReadings } from './incoming-readings';
import { type IntakeProblemRow, insertIntakeProblems } from './intakes';
import { updateLotChannels } from './lot-sums';

/**
 * Moves an intake's staged readings into `readings`, set by set, never a query per row: lots and their places are made, readings that
 * are there already change nothing and are counted, or are superseded where that was asked, and what each touched lot comes to on each
 * channel is worked out again.
 */

export interface StoredReadings {
  channelIds: number[];
  lotIds: number[];
  rowsUsed: number;
  rowsAlreadyThere: number;
  rowsSuperseding: number;
  rowsNotUsed: number;
  /** With those that supersede others. */
  readingsStored: number;
  readingsAlreadyThere: number;
  readingsSuperseding: number;
  superseded: SupersededPlace[];
}

/** What became of a lot on a channel of which readings were superseded. */
export interface SupersededPlace {
  lotId: number;
  lotNumber: string;
  channelName: string;
  readings: number;
  meanBefore: number | null;
  meanAfter: number | null;
  isDecided: boolean;
}

const MAX_LISTED = 500;

/** Of a row of `incoming`: it is stored now. */
const IS_STORED = `((${IS_NEW}) or supersedes)`;

export async function storeReadings(
  tx: Transaction,
  intake: { id: number; plantId: number; lineId: number; rowsRead: number },
  /** Of readings that differ, those stored up to this id are superseded; null: what is stored stands. */
  supersedable: number | null = null,
): Promise<StoredReadings> {
  await lockLineReadings(tx, intake.lineId);
  const ids: IntakePlace = { intakeId: intake.id, plantId: intake.plantId, lineId: intake.lineId };
  await makeLots(tx, ids);
  await gatherIncoming(tx, ids, supersedable);
  const touched = await lockTouched(tx);
  await tellDropped(tx, ids);
  await tellDiffering(tx, ids);
  const before = supersedable === null ? [] : await listSuperseded(tx);
  await insertReadings(tx, ids);
  if (before.length > 0) await supersede(tx, ids);
  await updateLotSpans(tx, ids);
  await updateLotChannels(tx, `select distinct channel_id, lot_id from incoming where ${IS_STORED}`);
  const superseded = await withMeansAfter(tx, before);
  const counts = await countRows(tx);
  await oweLooks(tx, ids);
  await updateInputsChanged(tx, touched.channelIds);
  await tx('staged_readings').where({ intake_id: intake.id }).delete();
  await tx.raw('drop table incoming');
  const { rowsUsed, rowsAlreadyThere, rowsSuperseding } = counts;
  return {
    ...touched,
    ...counts,
    rowsNotUsed: intake.rowsRead - rowsUsed - rowsAlreadyThere - rowsSuperseding,
    superseded,
  };
}

/** The channels and lots that get readings; the channels are locked before any of their rows, as recording verdicts does. */
async function lockTouched(tx: Transaction): Promise<{ channelIds: number[]; lotIds: number[] }> {
  const [touched] = await rows<{ channelIds: number[]; lotIds: number[] }>(
    tx,
    `select coalesce(array_agg(distinct channel_id), '{}') as "channelIds", coalesce(array_agg(distinct lot_id), '{}') as "lotIds"
     from incoming where ${IS_STORED}`,
  );
  const channelIds = touched.channelIds.map(Number);
  await tx.raw('select 1 from channels where id = any(:channelIds) order by id for update', { channelIds });
  return { channelIds, lotIds: touched.lotIds.map(Number) };
}

/** The next judging looks at the lots that got readings, although their verdicts may be settled; at lots without one it looks anyway. */
async function oweLooks(tx: Transaction, ids: IntakePlace): Promise<void> {
  await tx.raw(
    `insert into lots_to_rejudge (plant_id, channel_id, lot_id, because)
     select :plantId, i.channel_id, i.lot_id, case when i.supersedes then 'superseded' else 'added' end
     from (select channel_id, lot_id, bool_or(supersedes) as supersedes from incoming where ${IS_STORED} group by 1, 2) i
     join verdicts v on v.channel_id = i.channel_id and v.lot_id = i.lot_id and v.is_current
     on conflict (channel_id, lot_id) do update set because = excluded.because where excluded.because = 'superseded'`,
    ids,
  );
}

/** What the first row that gives a quantity says, with its unit; none where the workbook names none. Nothing is a lot of 0. */
const FIRST_QUANTITY = `
  (array_agg(quantity order by ordinal) filter (where quantity > 0))[1] as quantity,
  (array_agg(coalesce(quantity_unit, '') order by ordinal) filter (where quantity > 0))[1] as quantity_unit`;

/**
 * Makes the lots that are new, or were withdrawn. The first row that names a product says the lot's; rows that name another are none of it. Rows alike but for
 * time are gathered first, so that only some few a lot are put in order.
 */
async function makeLots(tx: Transaction, ids: IntakePlace): Promise<void> {
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
     on conflict (line_id, number, run) do update set product_id = excluded.product_id, quantity = excluded.quantity,
       quantity_unit = excluded.quantity_unit, starts_at = excluded.starts_at, ends_at = excluded.ends_at, withdrawn_at = null
     where lots.withdrawn_at is not null`,
    ids,
  );
}

/** Says of each reading that could not be used why not. */
async function tellDropped(tx: Transaction, ids: IntakePlace): Promise<void> {
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
async function tellDiffering(tx: Transaction, ids: IntakePlace): Promise<void> {
  const differing = await rows<{ sheet: string; row: number; column: string; stored: string; incoming: string }>(
    tx,
    `select sheet, "row", "column", coalesce(stored_value::text, 'off scale ' || stored_censoring) as stored,
       coalesce(value::text, 'off scale ' || censoring) as incoming
     from incoming where ${DIFFERS} and not supersedes order by ordinal limit ${MAX_LISTED}`,
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

async function insertReadings(tx: Transaction, ids: IntakePlace): Promise<void> {
  await tx.raw(
    `insert into lot_channels (plant_id, line_id, channel_id, lot_id)
     select distinct cast(:plantId as bigint), cast(:lineId as bigint), channel_id, lot_id from incoming where ${IS_NEW}
     on conflict do nothing`,
    ids,
  );
  await tx.raw(
    `insert into intake_lots (plant_id, channel_id, lot_id, intake_id)
     select distinct cast(:plantId as bigint), channel_id, lot_id, cast(:intakeId as bigint) from incoming where ${IS_STORED}`,
    ids,
  );
  await tx.raw(
    `insert into readings (plant_id, channel_id, lot_id, intake_id, measured_at, value, censoring, occurrence, serial, position)
     select :plantId, channel_id, lot_id, :intakeId, measured_at, value, censoring, occurrence, serial, position
     from incoming where ${IS_NEW} order by channel_id, measured_at`,
    ids,
  );
  await tx.raw(
    `insert into intake_reliances (plant_id, intake_id, earlier_intake_id, readings)
     select :plantId, :intakeId, stored_intake_id, count(*) from incoming where is_there and not supersedes group by stored_intake_id`,
    ids,
  );
  await tx.raw(
    `insert into intake_quantities (plant_id, intake_id, lot_id, quantity, quantity_unit)
     select :plantId, :intakeId, lot_id, quantity, quantity_unit from (
       select lot_id, ${FIRST_QUANTITY} from incoming where drop_code is null group by lot_id) q where quantity is not null`,
    ids,
  );
}

/** The lots and channels of which readings are superseded, with their means before. */
function listSuperseded(tx: Transaction): Promise<(SupersededPlace & { channelId: number })[]> {
  return rows(
    tx,
    `select i.lot_id as "lotId", l.number as "lotNumber", c.id as "channelId", c.name as "channelName", i.readings,
       lc.mean as "meanBefore", lc.mean as "meanAfter",
       exists (select 1 from holds h where h.lot_id = l.id and h.state = 'decided') as "isDecided"
     from (select channel_id, lot_id, count(*) as readings from incoming where supersedes group by 1, 2) i
     join lots l on l.id = i.lot_id join channels c on c.id = i.channel_id
     join lot_channels lc on lc.channel_id = i.channel_id and lc.lot_id = i.lot_id order by l.starts_at, l.id, c.id`,
  );
}

async function withMeansAfter(
  tx: Transaction,
  places: (SupersededPlace & { channelId: number })[],
): Promise<SupersededPlace[]> {
  if (places.length === 0) return [];
  const means = await rows<{ key: string; mean: number | null }>(
    tx,
    `select lot_id || ' ' || channel_id as key, mean from lot_channels
     where (channel_id, lot_id) in (select channel_id, lot_id from incoming where supersedes)`,
  );
  const after = new Map(means.map(({ key, mean }) => [key, mean]));
  return places.map(({ channelId, ...place }) => ({
    ...place,
    meanAfter: after.get(`${place.lotId} ${channelId}`) ?? null,
  }));
}

/** Stores the readings that differ and marks those in whose place they stand; their references are checked once both are there. */
async function supersede(tx: Transaction, ids: IntakePlace): Promise<void> {
  await tx.raw('set constraints readings_superseder_fkey deferred');
  await tx.raw('alter table incoming add column new_id bigint');
  await tx.raw(`update incoming set new_id = nextval(pg_get_serial_sequence('readings', 'id')) where supersedes`);
  await tx.raw(
    'update readings r set superseded_by = i.new_id from incoming i where i.supersedes and r.id = i.stored_id',
  );
  await tx.raw(
    `insert into readings (id, plant_id, channel_id, lot_id, intake_id, measured_at, value, censoring, occurrence, serial, position)
     overriding system value
     select new_id, :plantId, channel_id, lot_id, :intakeId, measured_at, value, censoring, occurrence, serial, position
     from incoming where supersedes order by new_id`,
    ids,
  );
  await tx.raw('set constraints readings_superseder_fkey immediate');
}

async function updateLotSpans(tx: Transaction, ids: IntakePlace): Promise<void> {
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

/** A sheet's row is used when it brought a reading, superseding when it took the place of one, already there when all of it is there. */
async function countRows(tx: Transaction) {
  const [counts] = await rows<{
    rowsUsed: number;
    rowsAlreadyThere: number;
    rowsSuperseding: number;
    readingsStored: number;
    readingsAlreadyThere: number;
    readingsSuperseding: number;
  }>(
    tx,
    `select count(*) filter (where new > 0) as "rowsUsed", count(*) filter (where new = 0 and superseding > 0) as "rowsSuperseding",
       count(*) filter (where new = 0 and superseding = 0 and there > 0) as "rowsAlreadyThere",
       coalesce(sum(new + superseding), 0)::bigint as "readingsStored", coalesce(sum(there), 0)::bigint as "readingsAlreadyThere",
       coalesce(sum(superseding), 0)::bigint as "readingsSuperseding"
     from (
       select count(*) filter (where ${IS_NEW}) as new, count(*) filter (where supersedes) as superseding,
         count(*) filter (where is_there and not supersedes) as there
       from incoming group by sheet, "row"
     ) by_row`,
  );
  return counts;
}

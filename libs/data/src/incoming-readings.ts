import { rows, type Transaction } from './database';

export type IntakePlace = { intakeId: number; plantId: number; lineId: number };

/** Of a reading `r`: it counts. */
export const inForce = (r: string) => `${r}.superseded_by is null and ${r}.withdrawn_at is null`;

/** Of a row of `incoming`: nothing is stored in its place. */
export const IS_NEW = 'not is_there and drop_code is null';
/** …another value is stored in its place. */
export const DIFFERS = 'is_there and (stored_value, stored_censoring) is distinct from (value, censoring)';

/** So that the readings of a large workbook are sorted in memory. */
const SORT_MEMORY_MB = 64;

/** Storing, withdrawing and comparing take turns on a line, so that what is seen of it stays true until the transaction ends. */
export async function lockLineReadings(tx: Transaction, lineId: number): Promise<void> {
  await tx.raw(`select pg_advisory_xact_lock(hashtext('store readings'), cast(:lineId as integer))`, { lineId });
  await tx.raw(`set local work_mem = '${SORT_MEMORY_MB}MB'`);
}

/**
 * The staged readings as a temporary table `incoming`: with their lots, occurrence numbers, what is stored already, and why a reading
 * cannot be used: no product for a new lot, another product than the lot has, a serial or position said twice at one instant. The first
 * row that names a product says a new lot's. Occurrence counts equal stamps by the order of rows.
 * @param supersedable of readings that differ, those stored up to this id are superseded; null: none
 */
export async function gatherIncoming(
  tx: Transaction,
  place: IntakePlace,
  supersedable: number | null = null,
): Promise<void> {
  const [span] = await rows<{ channelIds: number[]; from: Date; to: Date }>(
    tx,
    `select array_agg(distinct channel_id) as "channelIds", min(measured_at) as "from", max(measured_at) as "to"
     from staged_readings where intake_id = :intakeId`,
    place,
  );
  await tx.raw(
    `create temporary table incoming on commit drop as
     with alike as (
       select lot, product, min(ordinal) as ordinal from staged_readings where intake_id = :intakeId group by lot, product
     ), said as (
       select distinct on (a.lot) a.lot, p.id as product_id from alike a join products p on p.plant_id = :plantId and p.code = a.product
       order by a.lot, a.ordinal
     ), known as (
       select distinct on (number) id, number, product_id from lots
       where line_id = :lineId and number in (select lot from alike) and withdrawn_at is null order by number, run desc
     ), lots_said as (
       select a.lot, k.id, coalesce(k.product_id, s.product_id) as product_id
       from (select distinct lot from alike) a left join known k on k.number = a.lot left join said s on s.lot = a.lot
     ), staged as (
       select s.ordinal, s.sheet, s."row", s."column", s.lot, p.id as product_id, s.product as product_text, s.quantity, s.quantity_unit,
         s.channel_id, s.measured_at, s.value, s.censoring, coalesce(s.serial, '') as serial, coalesce(s.position, '') as position,
         row_number() over (partition by s.channel_id, s.measured_at, s.lot, coalesce(s.serial, ''), coalesce(s.position, '')
           order by s.ordinal)::integer as occurrence
       from staged_readings s left join products p on p.plant_id = :plantId and p.code = s.product
       where s.intake_id = :intakeId
     ), placed as (
       select s.*, l.id as lot_id, case when l.product_id is null then 'product-missing' when s.product_id <> l.product_id then 'product-differs'
           when s.occurrence > 1 and (s.serial <> '' or s.position <> '') then 'repeated-in-file' end as drop_code
       from staged s join lots_said l on l.lot = s.lot
     )
     select i.*, r.id is not null as is_there, r.value as stored_value, r.censoring as stored_censoring, r.id as stored_id,
       r.intake_id as stored_intake_id,
       coalesce(r.id <= cast(:supersedable as bigint) and (r.value, r.censoring) is distinct from (i.value, i.censoring), false) as supersedes
     from placed i left join readings r on i.drop_code is null and ${inForce('r')} and r.channel_id = i.channel_id
       and r.measured_at = i.measured_at and r.lot_id = i.lot_id and r.serial = i.serial and r.position = i.position
       and r.occurrence = i.occurrence and r.channel_id = any(:channelIds) and r.measured_at between :from and :to`,
    { ...place, channelIds: span.channelIds ?? [], from: span.from, to: span.to, supersedable },
  );
  await tx.raw('analyze incoming (channel_id, lot_id, measured_at)');
}

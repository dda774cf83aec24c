import { findRow, type Queryable, rows, type Transaction } from './database';

export interface SpecificationVersionRow {
  id: number;
  productId: number;
  characteristicId: number;
  version: number;
  nominal: number;
  lower: number | null;
  upper: number | null;
  appliesToIndividuals: boolean;
  validFrom: Date;
  until: Date | null;
  proposedByName: string;
  approvedByName: string;
  approvedAt: Date;
}

/** All versions of the plant, newest first within product and characteristic. */
export function listSpecificationVersions(
  db: Queryable,
  plantId: number,
  only: { productId?: number; characteristicId?: number } = {},
): Promise<SpecificationVersionRow[]> {
  return rows<SpecificationVersionRow>(
    db,
    `select s.id, s.product_id as "productId", s.characteristic_id as "characteristicId", s.version, s.nominal, s.lower, s.upper,
       s.applies_to_individuals as "appliesToIndividuals", lower(s.valid) as "validFrom", upper(s.valid) as until,
       b.name as "proposedByName", a.name as "approvedByName", s.approved_at as "approvedAt"
     from specifications s join people b on b.id = s.proposed_by join people a on a.id = s.approved_by
     where s.plant_id = :plantId and (cast(:productId as bigint) is null or s.product_id = :productId)
       and (cast(:characteristicId as bigint) is null or s.characteristic_id = :characteristicId)
     order by s.product_id, s.characteristic_id, s.version desc`,
    { plantId, productId: only.productId ?? null, characteristicId: only.characteristicId ?? null },
  );
}

/** Puts the next version in force from its first instant on, and ends the one before it there. */
export async function insertSpecificationVersion(
  tx: Transaction,
  version: {
    plantId: number;
    productId: number;
    characteristicId: number;
    nominal: number;
    lower: number | null;
    upper: number | null;
    appliesToIndividuals: boolean;
    validFrom: Date;
    proposedBy: number;
    approvedBy: number;
    approvedAt: Date;
  },
): Promise<{ id: number; version: number }> {
  await tx.raw(
    `update specifications set valid = tstzrange(lower(valid), :validFrom)
     where product_id = :productId and characteristic_id = :characteristicId and upper_inf(valid)
       and lower(valid) < cast(:validFrom as timestamptz)`,
    { productId: version.productId, characteristicId: version.characteristicId, validFrom: version.validFrom },
  );
  const [inserted] = await rows<{ id: number; version: number }>(
    tx,
    `insert into specifications (plant_id, product_id, characteristic_id, version, nominal, lower, upper, applies_to_individuals, valid,
       proposed_by, approved_by, approved_at)
     select :plantId, :productId, :characteristicId, coalesce(max(version), 0) + 1, :nominal, :lower, :upper, :appliesToIndividuals,
       tstzrange(cast(:validFrom as timestamptz), null), :proposedBy, :approvedBy, :approvedAt
     from specifications where product_id = :productId and characteristic_id = :characteristicId
     returning id, version`,
    version,
  );
  return inserted;
}

/** The lines on which the characteristic is measured. */
export async function listLineIdsOfCharacteristic(db: Queryable, characteristicId: number): Promise<number[]> {
  const found = await rows<{ id: number }>(
    db,
    'select distinct line_id as id from channels where characteristic_id = :characteristicId order by 1',
    { characteristicId },
  );
  return found.map((row) => row.id);
}

/**
 * Compares the stored lots of a product, from `from` on, with the specification of their start as it is now: readings beyond its limits
 * are counted anew. Returns the channels where that changed something; their judgements under way are not recorded.
 */
export async function updateSpecificationsOfLots(
  tx: Transaction,
  changed: { productId: number; characteristicId: number; from: Date },
): Promise<number[]> {
  await tx.raw('select 1 from channels where characteristic_id = :characteristicId order by id for update', {
    characteristicId: changed.characteristicId,
  });
  const updated = await rows<{ channelId: number }>(
    tx,
    `with touched as (
       select lc.channel_id, lc.lot_id, l.starts_at, l.ends_at, s.id as specification_id, s.lower, s.upper
       from lots l join lot_channels lc on lc.lot_id = l.id join channels c on c.id = lc.channel_id
       left join specifications s on s.product_id = l.product_id and s.characteristic_id = c.characteristic_id and s.valid @> l.starts_at
       where l.product_id = :productId and c.characteristic_id = :characteristicId and l.starts_at >= :from
         and lc.specification_id is distinct from s.id
     )
     update lot_channels lc set specification_id = t.specification_id, count_below = w.count_below, count_above = w.count_above
     from touched t cross join lateral (
       select count(*) filter (where r.value < t.lower) as count_below, count(*) filter (where r.value > t.upper) as count_above
       from readings r where r.channel_id = t.channel_id and r.measured_at between t.starts_at and t.ends_at and r.lot_id = t.lot_id
         and r.superseded_by is null and r.withdrawn_at is null
     ) w
     where lc.channel_id = t.channel_id and lc.lot_id = t.lot_id returning lc.channel_id as "channelId"`,
    changed,
  );
  const channelIds = [...new Set(updated.map((row) => row.channelId))].sort((a, b) => a - b);
  await tx.raw('update channels set inputs_version = inputs_version + 1 where id = any(:channelIds)', { channelIds });
  return channelIds;
}

/** How far the widest baseline of these channels reaches to either side of an instant, by their plans in force, s. */
export async function getBaselineReach(db: Queryable, channelIds: number[]): Promise<number> {
  const found = await findRow<{ reach: number | null }>(
    db,
    `select max((parameters->>'effectivePeriodSeconds')::float8) / 2 as reach from plan_revisions
     where channel_id = any(:channelIds) and state = 'in_force'`,
    { channelIds },
  );
  return found?.reach ?? 0;
}

import { findRow, type Queryable, rows, type Transaction } from './database';

export interface ProductSetUpRow {
  id: number;
  plantId: number;
  code: string;
  name: string;
  valuePerUnit: number | null;
  openHoldCount: number;
  proposalCount: number;
  isRetired: boolean;
}

const SELECT = `
  select p.id, p.plant_id as "plantId", p.code, p.name, p.value_per_unit as "valuePerUnit", p.retired_at is not null as "isRetired",
    (select count(*) from holds h join lots l on l.id = h.lot_id where l.product_id = p.id and h.state = 'open')::int as "openHoldCount",
    (select count(*) from specification_proposals s where s.product_id = p.id and s.state = 'proposed')::int as "proposalCount"
  from products p`;

export function listProductSetUps(db: Queryable, plantId: number): Promise<ProductSetUpRow[]> {
  return rows<ProductSetUpRow>(
    db,
    `${SELECT} where p.plant_id = :plantId order by p.retired_at is not null, p.code, p.id`,
    { plantId },
  );
}

export function findProductSetUp(db: Queryable, id: number): Promise<ProductSetUpRow | undefined> {
  return findRow<ProductSetUpRow>(db, `${SELECT} where p.id = :id`, { id });
}

export function findProductSetUpForUpdate(tx: Transaction, id: number): Promise<ProductSetUpRow | undefined> {
  return findRow<ProductSetUpRow>(tx, `${SELECT} where p.id = :id for update of p`, { id });
}

export async function insertProduct(
  tx: Transaction,
  product: { plantId: number; code: string; name: string; valuePerUnit: number | null },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    `insert into products (plant_id, code, name, value_per_unit) values (:plantId, :code, :name, :valuePerUnit) returning id`,
    product,
  );
  return id;
}

export async function updateProduct(
  tx: Transaction,
  id: number,
  changes: { code?: string; name?: string; valuePerUnit?: number | null; retiredAt?: Date | null },
): Promise<void> {
  await tx('products').where({ id }).update({
    code: changes.code,
    name: changes.name,
    value_per_unit: changes.valuePerUnit,
    retired_at: changes.retiredAt,
  });
}

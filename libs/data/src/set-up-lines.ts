import { findRow, type Queryable, rows, type Transaction } from './database';

export interface LineSetUpRow {
  id: number;
  plantId: number;
  name: string;
  channelCount: number;
  openHoldCount: number;
  isRetired: boolean;
}

const SELECT = `
  select l.id, l.plant_id as "plantId", l.name, l.retired_at is not null as "isRetired",
    (select count(*) from channels c where c.line_id = l.id and c.retired_at is null)::int as "channelCount",
    (select count(*) from holds h where h.line_id = l.id and h.state = 'open')::int as "openHoldCount"
  from lines l`;

export function listLineSetUps(db: Queryable, plantId: number): Promise<LineSetUpRow[]> {
  return rows<LineSetUpRow>(
    db,
    `${SELECT} where l.plant_id = :plantId order by l.retired_at is not null, l.name, l.id`,
    { plantId },
  );
}

export function findLineSetUp(db: Queryable, id: number): Promise<LineSetUpRow | undefined> {
  return findRow<LineSetUpRow>(db, `${SELECT} where l.id = :id`, { id });
}

export function findLineSetUpForUpdate(tx: Transaction, id: number): Promise<LineSetUpRow | undefined> {
  return findRow<LineSetUpRow>(tx, `${SELECT} where l.id = :id for update of l`, { id });
}

export async function insertLine(tx: Transaction, line: { plantId: number; name: string }): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    'insert into lines (plant_id, name) values (:plantId, :name) returning id',
    line,
  );
  return id;
}

export async function updateLine(
  tx: Transaction,
  id: number,
  changes: { name?: string; retiredAt?: Date | null },
): Promise<void> {
  await tx('lines').where({ id }).update({ name: changes.name, retired_at: changes.retiredAt });
}

import { findRow, type Queryable, rows, type Transaction } from './database';

export interface CharacteristicSetUpRow {
  id: number;
  plantId: number;
  name: string;
  unit: string;
  resolution: number;
  /** No reading and no specification is stated in the unit yet. */
  mayChangeUnit: boolean;
  channelCount: number;
  proposalCount: number;
  isRetired: boolean;
}

const SELECT = `
  select x.id, x.plant_id as "plantId", x.name, x.unit, x.resolution, x.retired_at is not null as "isRetired",
    not exists (select 1 from channels c join lot_channels lc on lc.channel_id = c.id where c.characteristic_id = x.id)
      and not exists (select 1 from specifications s where s.characteristic_id = x.id)
      and not exists (select 1 from specification_proposals s where s.characteristic_id = x.id) as "mayChangeUnit",
    (select count(*) from channels c where c.characteristic_id = x.id and c.retired_at is null)::int as "channelCount",
    (select count(*) from specification_proposals s where s.characteristic_id = x.id and s.state = 'proposed')::int as "proposalCount"
  from characteristics x`;

export function listCharacteristicSetUps(db: Queryable, plantId: number): Promise<CharacteristicSetUpRow[]> {
  return rows<CharacteristicSetUpRow>(
    db,
    `${SELECT} where x.plant_id = :plantId order by x.retired_at is not null, x.name, x.id`,
    { plantId },
  );
}

export function findCharacteristicSetUp(db: Queryable, id: number): Promise<CharacteristicSetUpRow | undefined> {
  return findRow<CharacteristicSetUpRow>(db, `${SELECT} where x.id = :id`, { id });
}

export function findCharacteristicSetUpForUpdate(
  tx: Transaction,
  id: number,
): Promise<CharacteristicSetUpRow | undefined> {
  return findRow<CharacteristicSetUpRow>(tx, `${SELECT} where x.id = :id for update of x`, { id });
}

export async function insertCharacteristic(
  tx: Transaction,
  characteristic: { plantId: number; name: string; unit: string; resolution: number },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    `insert into characteristics (plant_id, name, unit, resolution) values (:plantId, :name, :unit, :resolution) returning id`,
    characteristic,
  );
  return id;
}

export async function updateCharacteristic(
  tx: Transaction,
  id: number,
  changes: { name?: string; unit?: string; resolution?: number; retiredAt?: Date | null },
): Promise<void> {
  await tx('characteristics').where({ id }).update({
    name: changes.name,
    unit: changes.unit,
    resolution: changes.resolution,
    retired_at: changes.retiredAt,
  });
}

import { findRow, type Queryable, rows, type Transaction } from './database';

export interface ChannelSetUpRow {
  id: number;
  plantId: number;
  name: string;
  lineId: number;
  lineName: string;
  isLineRetired: boolean;
  characteristicId: number;
  characteristicName: string;
  isCharacteristicRetired: boolean;
  unit: string;
  resolution: number;
  position: string;
  /** Newest first; instants as ISO 8601 text. */
  gauges: { gaugeId: number; assetNumber: string; isRetired: boolean; since: string; until: string | null }[];
  hasReadings: boolean;
  isRetired: boolean;
}

const SELECT = `
  select c.id, c.plant_id as "plantId", c.name, l.id as "lineId", l.name as "lineName", l.retired_at is not null as "isLineRetired",
    x.id as "characteristicId", x.name as "characteristicName", x.retired_at is not null as "isCharacteristicRetired", x.unit, x.resolution,
    c.position, c.retired_at is not null as "isRetired",
    coalesce((select json_agg(json_build_object('gaugeId', g.id, 'assetNumber', g.asset_number, 'isRetired', g.retired_at is not null,
        'since', lower(cg.served), 'until', upper(cg.served)) order by lower(cg.served) desc)
      from channel_gauges cg join gauges g on g.id = cg.gauge_id where cg.channel_id = c.id), '[]') as gauges,
    exists (select 1 from lot_channels lc where lc.channel_id = c.id) as "hasReadings"
  from channels c join lines l on l.id = c.line_id join characteristics x on x.id = c.characteristic_id`;

export function listChannelSetUps(db: Queryable, plantId: number): Promise<ChannelSetUpRow[]> {
  return rows<ChannelSetUpRow>(
    db,
    `${SELECT} where c.plant_id = :plantId order by c.retired_at is not null, l.name, c.name, c.id`,
    { plantId },
  );
}

export function findChannelSetUp(db: Queryable, id: number): Promise<ChannelSetUpRow | undefined> {
  return findRow<ChannelSetUpRow>(db, `${SELECT} where c.id = :id`, { id });
}

export function findChannelSetUpForUpdate(tx: Transaction, id: number): Promise<ChannelSetUpRow | undefined> {
  return findRow<ChannelSetUpRow>(tx, `${SELECT} where c.id = :id for update of c`, { id });
}

export async function insertChannel(
  tx: Transaction,
  channel: { plantId: number; lineId: number; characteristicId: number; position: string; name: string },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    `insert into channels (plant_id, line_id, characteristic_id, position, name)
     values (:plantId, :lineId, :characteristicId, :position, :name) returning id`,
    channel,
  );
  return id;
}

export async function updateChannel(
  tx: Transaction,
  id: number,
  changes: { name?: string; position?: string; retiredAt?: Date | null },
): Promise<void> {
  await tx('channels')
    .where({ id })
    .update({ name: changes.name, position: changes.position, retired_at: changes.retiredAt });
}

/** From `since` on the gauge serves the channel; the one that served till now ends there. */
export async function insertGaugeService(
  tx: Transaction,
  service: { plantId: number; channelId: number; gaugeId: number; since: Date },
): Promise<void> {
  await tx.raw(
    `update channel_gauges set served = tstzrange(lower(served), :since)
     where channel_id = :channelId and upper_inf(served) and lower(served) < cast(:since as timestamptz)`,
    { channelId: service.channelId, since: service.since },
  );
  await tx.raw(
    `insert into channel_gauges (plant_id, channel_id, gauge_id, served)
     values (:plantId, :channelId, :gaugeId, tstzrange(cast(:since as timestamptz), null))`,
    { ...service },
  );
}

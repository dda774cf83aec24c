import { findRow, type Queryable, rows, type Transaction } from './database';

export interface GaugeSetUpRow {
  id: number;
  plantId: number;
  assetNumber: string;
  kind: string;
  /** Channels in use that it serves now. */
  serves: { channelId: number; channelName: string; lineName: string; since: string }[];
  isRetired: boolean;
}

const SELECT = `
  select g.id, g.plant_id as "plantId", g.asset_number as "assetNumber", g.kind, g.retired_at is not null as "isRetired",
    coalesce((select json_agg(json_build_object('channelId', c.id, 'channelName', c.name, 'lineName', l.name, 'since', lower(cg.served))
        order by l.name, c.name)
      from channel_gauges cg join channels c on c.id = cg.channel_id join lines l on l.id = c.line_id
      where cg.gauge_id = g.id and upper_inf(cg.served) and c.retired_at is null), '[]') as serves
  from gauges g`;

export function listGaugeSetUps(db: Queryable, plantId: number): Promise<GaugeSetUpRow[]> {
  return rows<GaugeSetUpRow>(
    db,
    `${SELECT} where g.plant_id = :plantId order by g.retired_at is not null, g.asset_number, g.id`,
    { plantId },
  );
}

export function findGaugeSetUp(db: Queryable, id: number): Promise<GaugeSetUpRow | undefined> {
  return findRow<GaugeSetUpRow>(db, `${SELECT} where g.id = :id`, { id });
}

export function findGaugeSetUpForUpdate(tx: Transaction, id: number): Promise<GaugeSetUpRow | undefined> {
  return findRow<GaugeSetUpRow>(tx, `${SELECT} where g.id = :id for update of g`, { id });
}

export async function insertGauge(
  tx: Transaction,
  gauge: { plantId: number; assetNumber: string; kind: string },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    'insert into gauges (plant_id, asset_number, kind) values (:plantId, :assetNumber, :kind) returning id',
    gauge,
  );
  return id;
}

export async function updateGauge(
  tx: Transaction,
  id: number,
  changes: { assetNumber?: string; kind?: string; retiredAt?: Date | null },
): Promise<void> {
  await tx('gauges')
    .where({ id })
    .update({ asset_number: changes.assetNumber, kind: changes.kind, retired_at: changes.retiredAt });
}

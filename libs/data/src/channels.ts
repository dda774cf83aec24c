import type { PlanState } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';

export interface ChannelRow {
  id: number;
  name: string;
  lineId: number;
  lineName: string;
  plantId: number;
  characteristicName: string;
  unit: string;
  resolution: number;
  position: string;
  gaugeId: number | null;
  gaugeAssetNumber: string | null;
  gaugeKind: string | null;
  planId: number | null;
  planRevision: number | null;
  planApprovedAt: Date | null;
  /** Of the plan in force. */
  limit: number | null;
  /** Of the plan in force: what stands for the nominal value of a product without a specification. */
  fallbackNominal: number | null;
  pendingId: number | null;
  pendingRevision: number | null;
  pendingState: PlanState | null;
  retiredAt: Date | null;
}

/** The channel with the gauge that serves it at `:now`, its plan in force, and the revision that waits, if any. */
const SELECT = `
  select c.id, c.name, c.line_id as "lineId", l.name as "lineName", c.plant_id as "plantId", x.name as "characteristicName",
    x.unit, x.resolution, c.position, g.id as "gaugeId", g.asset_number as "gaugeAssetNumber", g.kind as "gaugeKind",
    f.id as "planId", f.revision as "planRevision", f.approved_at as "planApprovedAt", (f.parameters->>'limit')::float8 as "limit",
    (f.parameters->>'fallbackNominal')::float8 as "fallbackNominal",
    w.id as "pendingId", w.revision as "pendingRevision", w.state as "pendingState", c.retired_at as "retiredAt"
  from channels c join lines l on l.id = c.line_id join characteristics x on x.id = c.characteristic_id
  left join channel_gauges cg on cg.channel_id = c.id and cg.served @> cast(:now as timestamptz) left join gauges g on g.id = cg.gauge_id
  left join plan_revisions f on f.channel_id = c.id and f.state = 'in_force'
  left join plan_revisions w on w.channel_id = c.id and w.state in ('draft', 'proposed')`;

export function listChannels(db: Queryable, lineId: number, now: Date): Promise<ChannelRow[]> {
  return rows<ChannelRow>(db, `${SELECT} where c.line_id = :lineId order by c.retired_at is not null, c.id`, {
    lineId,
    now,
  });
}

export function findChannel(db: Queryable, id: number, now: Date): Promise<ChannelRow | undefined> {
  return findRow<ChannelRow>(db, `${SELECT} where c.id = :id`, { id, now });
}

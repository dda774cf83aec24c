import type { ControlState } from '@app/contracts';
import { rows, type Queryable } from './database';

/** What the mail about a held lot says of each cause. */
export interface HoldMailFact {
  holdId: number;
  lotNumber: string;
  product: string;
  lotStartsAt: Date;
  lotEndsAt: Date;
  channelName: string;
  unit: string;
  resolution: number;
  gaugeAssetNumber: string | null;
  sentence: string;
  lotMean: number | null;
  baseline: number | null;
  score: number | null;
  limit: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  lower: number | null;
  upper: number | null;
  isProvisional: boolean;
  constantState: ControlState;
}

export async function listHoldMailFacts(db: Queryable, holdIds: number[]): Promise<HoldMailFact[]> {
  return rows<HoldMailFact>(
    db,
    `select h.id as "holdId", l.number as "lotNumber", p.code as product, l.starts_at as "lotStartsAt", l.ends_at as "lotEndsAt",
       c.name as "channelName", x.unit, x.resolution, g.asset_number as "gaugeAssetNumber", k.sentence, v.lot_mean as "lotMean", v.baseline,
       v.score, v.score_limit as "limit", v.control_low as "controlLow", v.control_high as "controlHigh", s.lower, s.upper,
       v.is_provisional as "isProvisional", v.constant_state as "constantState"
     from holds h join lots l on l.id = h.lot_id join products p on p.id = l.product_id join hold_causes k on k.hold_id = h.id
     join verdicts v on v.id = k.verdict_id join channels c on c.id = k.channel_id join characteristics x on x.id = c.characteristic_id
     left join channel_gauges cg on cg.channel_id = c.id and cg.served @> l.starts_at left join gauges g on g.id = cg.gauge_id
     left join specifications s on s.id = v.specification_id
     where h.id = any(:holdIds) order by l.starts_at, h.id, k.id`,
    { holdIds },
  );
}

/** The line and the plant's zone, for a mail's head. */
export async function getLinePlace(
  db: Queryable,
  lineId: number,
): Promise<{ lineName: string; plantId: number; plantName: string; timeZone: string }> {
  const [row] = await rows<{ lineName: string; plantId: number; plantName: string; timeZone: string }>(
    db,
    `select l.name as "lineName", p.id as "plantId", p.name as "plantName", p.time_zone as "timeZone"
     from lines l join plants p on p.id = l.plant_id where l.id = :lineId`,
    { lineId },
  );
  return row;
}

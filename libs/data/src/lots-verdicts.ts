import type { ControlState, SignalName, SpecificationState } from '@app/contracts';
import { type Queryable, rows } from './database';

export interface VerdictSignalRow {
  signal: SignalName;
  action: 'holds' | 'notice' | 'off';
  facts: Record<string, number | string | null>;
}

export interface VerdictRow {
  id: number;
  lotId: number;
  channelId: number;
  channelName: string;
  characteristicName: string;
  unit: string;
  resolution: number;
  gaugeAssetNumber: string | null;
  controlState: ControlState;
  isProvisional: boolean;
  notScoredReason: string | null;
  score: number | null;
  limit: number | null;
  residual: number | null;
  residualSd: number | null;
  readingCount: number;
  lotMean: number | null;
  baseline: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  specificationState: SpecificationState;
  nominal: number | null;
  lower: number | null;
  upper: number | null;
  constantState: ControlState;
  constantLow: number | null;
  constantHigh: number | null;
  constantScore: number | null;
  signals: VerdictSignalRow[];
  planRevision: number | null;
  methodVersion: string;
  judgedAt: Date;
}

/** A lot's current verdicts, a channel each, with the gauge that served when the lot began. */
export function listVerdicts(db: Queryable, lotId: number): Promise<VerdictRow[]> {
  return rows<VerdictRow>(
    db,
    `select v.id, v.lot_id as "lotId", c.id as "channelId", c.name as "channelName", x.name as "characteristicName", x.unit, x.resolution,
       g.asset_number as "gaugeAssetNumber", v.control_state as "controlState", v.is_provisional as "isProvisional",
       v.not_scored_reason as "notScoredReason", v.score, v.score_limit as "limit", v.residual, v.residual_sd as "residualSd",
       v.reading_count as "readingCount", v.lot_mean as "lotMean", v.baseline, v.control_low as "controlLow",
       v.control_high as "controlHigh", v.specification_state as "specificationState", s.nominal, s.lower, s.upper,
       v.constant_state as "constantState", v.constant_low as "constantLow", v.constant_high as "constantHigh",
       v.constant_score as "constantScore",
       coalesce((select json_agg(json_build_object('signal', y.signal, 'action', y.action, 'facts', y.facts) order by y.action, y.signal)
         from verdict_signals y where y.verdict_id = v.id), '[]') as signals,
       r.revision as "planRevision", f.method_version as "methodVersion", v.judged_at as "judgedAt"
     from verdicts v join lots l on l.id = v.lot_id join channels c on c.id = v.channel_id
     join characteristics x on x.id = c.characteristic_id join fits f on f.id = v.fit_id
     left join plan_revisions r on r.id = f.plan_revision_id left join specifications s on s.id = v.specification_id
     left join channel_gauges cg on cg.channel_id = c.id and cg.served @> l.starts_at left join gauges g on g.id = cg.gauge_id
     where v.lot_id = :lotId and v.is_current order by c.id`,
    { lotId },
  );
}

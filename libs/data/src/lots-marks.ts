import {
  CONTROL_STATES,
  type Disposition,
  type HoldState,
  type LotMark,
  type SpecificationState,
} from '@app/contracts';
import { type Queryable, rows } from './database';

interface MarkRow {
  lotId: number;
  controlRank: number | null;
  isProvisional: boolean | null;
  specificationRank: number | null;
  hasNotice: boolean | null;
  holdState: HoldState | null;
  disposition: Disposition | null;
  isExcluded: boolean;
}

/** From the best to the worst; a lot's mark shows the worst of its verdicts. */
const CONTROL_BY_RANK = [CONTROL_STATES[0], CONTROL_STATES[2], CONTROL_STATES[1]] as const;
const SPECIFICATION_BY_RANK: readonly SpecificationState[] = [
  'no_specification',
  'inside_specification',
  'inside_within_guard_band',
  'outside_specification',
];

/** An exclusion that no later one corrects, and that is not itself the taking back of one. */
const EXCLUSION_IN_FORCE = `not e.is_withdrawn and not exists (select 1 from exclusions c where c.corrects_id = e.id)`;

/**
 * The one place where a lot's mark comes about: worst of its current verdicts, open hold before a decided one, last disposition.
 * With a channel, only that channel's verdict and exclusion count, as its record shows them; hold and fate are the lot's.
 */
export async function mapLotMarks(
  db: Queryable,
  lotIds: number[],
  channelId: number | null = null,
): Promise<Map<number, LotMark>> {
  if (lotIds.length === 0) return new Map();
  const found = await rows<MarkRow>(
    db,
    `with judged as (
       select v.lot_id,
         max(case v.control_state when 'outside_control_limits' then 2 when 'not_scored' then 1 else 0 end) as control_rank,
         bool_or(v.is_provisional) as is_provisional,
         max(case v.specification_state when 'outside_specification' then 3 when 'inside_within_guard_band' then 2
           when 'inside_specification' then 1 else 0 end) as specification_rank,
         bool_or(exists (select 1 from verdict_signals s where s.verdict_id = v.id and s.action = 'notice')) as has_notice
       from verdicts v
       where v.is_current and v.lot_id = any(:lotIds) ${channelId === null ? '' : 'and v.channel_id = :channelId'}
       group by v.lot_id
     ), held as (
       select distinct on (lot_id) lot_id, state from holds where lot_id = any(:lotIds) and state <> 'withdrawn'
       order by lot_id, state = 'open' desc, id desc
     ), decided as (
       select distinct on (h.lot_id) h.lot_id, p.disposition from holds h join decision_parts p on p.hold_id = h.id
       where h.lot_id = any(:lotIds) order by h.lot_id, p.decision_id desc, p.id
     ), excluded as (
       select distinct e.lot_id from exclusions e
       where e.lot_id = any(:lotIds) and ${EXCLUSION_IN_FORCE} ${channelId === null ? '' : 'and e.channel_id = :channelId'}
     )
     select l.id as "lotId", j.control_rank as "controlRank", j.is_provisional as "isProvisional",
       j.specification_rank as "specificationRank", j.has_notice as "hasNotice", h.state as "holdState", d.disposition,
       x.lot_id is not null as "isExcluded"
     from unnest(cast(:lotIds as bigint[])) as l(id) left join judged j on j.lot_id = l.id left join held h on h.lot_id = l.id
     left join decided d on d.lot_id = l.id left join excluded x on x.lot_id = l.id`,
    channelId === null ? { lotIds } : { lotIds, channelId },
  );
  return new Map(found.map((row) => [row.lotId, toMark(row)]));
}

function toMark(row: MarkRow): LotMark {
  return {
    controlState: row.controlRank === null ? 'not_scored' : CONTROL_BY_RANK[row.controlRank],
    isProvisional: row.isProvisional ?? false,
    specificationState: SPECIFICATION_BY_RANK[row.specificationRank ?? 0],
    hasNotice: row.hasNotice ?? false,
    holdState: row.holdState,
    disposition: row.disposition,
    isExcluded: row.isExcluded,
  };
}

import type { LotOnChannel, PlanParameters } from '@app/scoring';
import { mergeBlocks } from '@app/scoring';
import { findRow, type Queryable, rows } from './database';

/** All that judging a channel reads, as of `inputsVersion`. */
export interface ChannelInputs {
  channelId: number;
  plantId: number;
  inputsVersion: number;
  plan: { id: number; revision: number; approvedAt: Date; isFirst: boolean; parameters: PlanParameters } | null;
  segments: SegmentInputs[];
}

export interface SegmentInputs {
  /** Epoch seconds; null before any break. */
  startsAt: number | null;
  /** What movements are counted from, of the segment's last fit. */
  startLevel: number | null;
  endsAt: number | null;
  lots: LotOnChannel[];
  lotIdsToJudge: number[];
}

interface LotRow {
  lotId: number;
  firstAt: number;
  lastAt: number;
  meanAt: number;
  count: number;
  censoredLow: number;
  censoredHigh: number;
  minimum: number | null;
  maximum: number | null;
  countBelow: number;
  countAbove: number;
  mean: number | null;
  sumSquares: number | null;
  blocks: { index: number; at: number; count: number; mean: number; sumSquares: number }[] | null;
  nominal: number | null;
  lower: number | null;
  upper: number | null;
  pulls: boolean;
  isSettled: boolean;
}

const IS_TO_REJUDGE = `exists (select 1 from lots_to_rejudge j where j.channel_id = lc.channel_id and j.lot_id = lc.lot_id)`;

/** Lots whose blocks are needed are longer than this share of T; the others are one point (one lot, one point). */
const ONE_POINT_SHARE = 0.1;

/**
 * A lot pulls unless it is held and undecided, or scrapped, or excluded by hand. `from` and `to` bound the lots' middle, epoch seconds.
 */
async function listLotRows(
  db: Queryable,
  channelId: number,
  span: { from: number; to: number | null },
  shortestPeriodSeconds: number,
): Promise<LotRow[]> {
  return rows<LotRow>(
    db,
    `select lc.lot_id as "lotId", extract(epoch from lc.first_at)::float8 as "firstAt", extract(epoch from lc.last_at)::float8 as "lastAt",
       extract(epoch from coalesce(lc.mean_at, lc.first_at))::float8 as "meanAt", lc.count, lc.censored_low as "censoredLow",
       lc.censored_high as "censoredHigh", lc.minimum, lc.maximum, lc.count_below as "countBelow", lc.count_above as "countAbove",
       lc.mean, lc.sum_squares as "sumSquares",
       case when extract(epoch from lc.last_at - lc.first_at) > :onePointSeconds then lc.blocks end as blocks,
       s.nominal, s.lower, s.upper,
       not exists (select 1 from holds h where h.lot_id = lc.lot_id and h.state = 'open')
         and not exists (select 1 from holds h join decision_parts p on p.hold_id = h.id where h.lot_id = lc.lot_id and p.disposition = 'scrap')
         and not exists (select 1 from exclusions e where e.channel_id = lc.channel_id and e.lot_id = lc.lot_id and not e.is_withdrawn
           and not exists (select 1 from exclusions c where c.corrects_id = e.id)) as pulls,
       coalesce(not v.is_provisional and v.not_scored_reason is distinct from 'no_plan_in_force' and v.reading_count = lc.count
         and not ${IS_TO_REJUDGE}, false) as "isSettled"
     from lot_channels lc
     left join specifications s on s.id = lc.specification_id
     left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
     where lc.channel_id = :channelId and lc.first_at is not null
       and coalesce(lc.mean_at, lc.first_at) >= to_timestamp(:from) and (cast(:to as float8) is null or coalesce(lc.mean_at, lc.first_at) < to_timestamp(:to))
       and lc.first_at >= to_timestamp(:from) - interval '10 days'
     order by lc.first_at, lc.lot_id`,
    { channelId, from: span.from, to: span.to, onePointSeconds: ONE_POINT_SHARE * shortestPeriodSeconds },
  );
}

function asLot(row: LotRow, shortestPeriodSeconds: number): LotOnChannel {
  const blocks =
    row.blocks ??
    (row.count > 0 && row.mean !== null
      ? [{ index: 0, at: row.meanAt, count: row.count, mean: row.mean, sumSquares: row.sumSquares ?? 0 }]
      : []);
  return {
    lotId: row.lotId,
    firstAt: row.firstAt,
    lastAt: row.lastAt,
    count: row.count,
    censoredLow: row.censoredLow,
    censoredHigh: row.censoredHigh,
    minimum: row.minimum,
    maximum: row.maximum,
    countBelow: row.countBelow,
    countAbove: row.countAbove,
    points:
      row.blocks === null
        ? blocks.map(({ at, count, mean, sumSquares }) => ({ at, count, mean, sumSquares }))
        : mergeBlocks(row.blocks, row.firstAt, row.lastAt, shortestPeriodSeconds),
    specification: row.nominal === null ? null : { nominal: row.nominal, lower: row.lower, upper: row.upper },
    pulls: row.pulls,
  };
}

/** Starts of the segments: breaks in force, oldest first, epoch seconds. */
async function listSegmentStarts(db: Queryable, channelId: number): Promise<number[]> {
  const found = await rows<{ at: number }>(
    db,
    `select extract(epoch from b.at)::float8 as at from breaks b where b.channel_id = :channelId and not b.is_withdrawn
       and not exists (select 1 from breaks c where c.corrects_id = b.id) order by b.at`,
    { channelId },
  );
  return found.map((row) => row.at);
}

/** The level that movements are counted from, kept with the segment's last fit by the same plan; none that knew an intake withdrawn since. */
async function findStartLevel(
  db: Queryable,
  channelId: number,
  segmentStartsAt: number | null,
): Promise<number | null> {
  const row = await findRow<{ startLevel: number | null }>(
    db,
    `select f.start_level as "startLevel" from fits f join plan_revisions p on p.id = f.plan_revision_id and p.state = 'in_force'
     where f.channel_id = :channelId and f.start_level is not null
       and f.segment_starts_at is not distinct from to_timestamp(cast(:segmentStartsAt as float8))
       and not exists (select 1 from intakes w where w.plant_id = f.plant_id and w.state = 'withdrawn' and w.channel_ids @> array[f.channel_id]
         and f.judged_at between w.readings_stored_at and w.withdrawn_at)
     order by f.judged_at desc, f.id desc limit 1`,
    { channelId, segmentStartsAt },
  );
  return row?.startLevel ?? null;
}

const DEFAULT_PERIOD_SECONDS = 3 * 86_400;

/**
 * Everything a judging of the channel needs, read in one snapshot by the caller's transaction. Segments without a lot to judge are left
 * out. Settled lots are judged again only from `rejudgeFrom` (epoch s) on, or when something is owed to them (`lots_to_rejudge`).
 */
export async function getChannelInputs(
  db: Queryable,
  channelId: number,
  rejudgeFrom: number | null = null,
): Promise<ChannelInputs> {
  const channel = await findRow<{ plantId: number; inputsVersion: number }>(
    db,
    `select plant_id as "plantId", inputs_version as "inputsVersion" from channels where id = :channelId`,
    { channelId },
  );
  if (!channel) throw new Error(`no channel ${channelId}`);
  const plan = await findRow<{
    id: number;
    revision: number;
    approvedAt: Date;
    isFirst: boolean;
    parameters: PlanParameters;
  }>(
    db,
    `select p.id, p.revision, p.approved_at as "approvedAt", p.parameters,
       not exists (select 1 from plan_revisions o where o.channel_id = p.channel_id and o.approved_at < p.approved_at) as "isFirst"
     from plan_revisions p where p.channel_id = :channelId and p.state = 'in_force'`,
    { channelId },
  );
  const bounds = await findRow<{ from: number | null }>(
    db,
    `select extract(epoch from min(coalesce(lc.mean_at, lc.first_at)))::float8 as "from" from lot_channels lc
     left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
     where lc.channel_id = :channelId and lc.first_at is not null
       and (v.id is null or v.is_provisional or v.not_scored_reason = 'no_plan_in_force' or v.reading_count <> lc.count
         or ${IS_TO_REJUDGE} or lc.last_at >= to_timestamp(cast(:rejudgeFrom as float8)))`,
    { channelId, rejudgeFrom },
  );
  const inputs: ChannelInputs = { channelId, ...channel, plan: plan ?? null, segments: [] };
  if (bounds?.from == null) return inputs;
  const period = plan?.parameters.shortestPeriodSeconds ?? DEFAULT_PERIOD_SECONDS;
  const window = plan?.parameters.windowSeconds ?? 0;
  const starts = await listSegmentStarts(db, channelId);
  const edges = [-Infinity, ...starts];
  for (const [index, start] of edges.entries()) {
    const end = index + 1 < edges.length ? edges[index + 1] : null;
    if (end !== null && end <= bounds.from) continue;
    const from = Math.max(start, bounds.from - window);
    const lotRows = await listLotRows(db, channelId, { from, to: end }, period);
    const toJudge = lotRows
      .filter((row) => !row.isSettled || (rejudgeFrom !== null && row.lastAt >= rejudgeFrom))
      .map((row) => row.lotId);
    if (toJudge.length === 0) continue;
    inputs.segments.push({
      startsAt: Number.isFinite(start) ? start : null,
      startLevel: await findStartLevel(db, channelId, Number.isFinite(start) ? start : null),
      endsAt: end,
      lots: lotRows.map((row) => asLot(row, period)),
      lotIdsToJudge: toJudge,
    });
  }
  return inputs;
}

/** The plant's shares of the tolerance that a channel's baseline may move: told, and the most. */
export async function getAllowanceShares(
  db: Queryable,
  channelId: number,
): Promise<{ noticeShare: number; capShare: number }> {
  const shares = await findRow<{ noticeShare: number; capShare: number }>(
    db,
    `select p.allowance_notice_share as "noticeShare", p.allowance_cap_share as "capShare"
     from channels c join plants p on p.id = c.plant_id where c.id = :channelId`,
    { channelId },
  );
  if (!shares) throw new Error(`no channel ${channelId}`);
  return shares;
}

/** The lots of a channel's newest segment, for proposing a plan, with the unit's tolerance where every product has the same. */
export async function getProposalInputs(
  db: Queryable,
  channelId: number,
  options: { windowSeconds: number; shortestPeriodSeconds: number },
): Promise<{ lots: LotOnChannel[]; tolerance: number | null; lotNumbers: Map<number, string> }> {
  const newest = await findRow<{ at: number | null }>(
    db,
    `select extract(epoch from max(last_at))::float8 as at from lot_channels where channel_id = :channelId`,
    { channelId },
  );
  if (newest?.at == null) return { lots: [], tolerance: null, lotNumbers: new Map() };
  const starts = (await listSegmentStarts(db, channelId)).filter((start) => start <= (newest.at ?? 0));
  const from = Math.max(newest.at - options.windowSeconds, starts.at(-1) ?? -Infinity);
  const lotRows = await listLotRows(db, channelId, { from, to: null }, options.shortestPeriodSeconds);
  const tolerances = lotRows.flatMap((row) =>
    row.lower !== null && row.upper !== null ? [row.upper - row.lower] : [],
  );
  const numbers = await rows<{ id: number; number: string }>(db, `select id, number from lots where id = any(:ids)`, {
    ids: lotRows.map((row) => row.lotId),
  });
  return {
    lots: lotRows.map((row) => asLot(row, options.shortestPeriodSeconds)),
    tolerance: tolerances.length > 0 ? Math.min(...tolerances) : null,
    lotNumbers: new Map(numbers.map((row) => [row.id, row.number])),
  };
}

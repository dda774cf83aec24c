import type { LotJudgement, SegmentJudgement } from '@app/scoring';
import { rows, type Transaction } from './database';
import { type HoldCandidate, holdLots, type HeldLot } from './open-holds';

/** A channel as judged away from the database: recorded only if its inputs are still those that were read. */
export interface JudgedChannel {
  channelId: number;
  plantId: number;
  inputsVersion: number;
  plan: { id: number; approvedAt: Date; isFirst: boolean; limit: number } | null;
  /** `drawFrom`: start of the oldest judged lot, epoch seconds; what was drawn before it stays. */
  segments: {
    startsAt: number | null;
    endsAt: number | null;
    drawFrom: number;
    inputHash: Buffer;
    judgement: SegmentJudgement;
  }[];
}

export interface Recorded {
  verdictCount: number;
  held: HeldLot[];
}

/** Thrown when a channel's inputs changed between reading and recording: judge it again. */
export class InputsChangedError extends Error {
  constructor(readonly channelIds: number[]) {
    super(`inputs changed for channels ${channelIds.join(', ')}`);
    this.name = 'InputsChangedError';
  }
}

/** Records fits, verdicts, signals, drawn baselines and holds of the judged channels. Throws InputsChangedError when any of them is stale. */
export async function recordJudgements(
  tx: Transaction,
  judged: JudgedChannel[],
  context: { intakeId: number | null; methodVersion: string; at: Date },
): Promise<Recorded> {
  await lockUnchanged(tx, judged);
  const candidates: HoldCandidate[] = [];
  const changedLotIds = new Set<number>();
  let verdictCount = 0;
  for (const channel of judged) {
    for (const segment of channel.segments) {
      const fitId = await insertFit(tx, channel, segment, context);
      await replaceCurve(tx, channel, segment, fitId);
      const written = await insertVerdicts(tx, channel, segment.judgement.lots, fitId, context.at);
      verdictCount += written.length;
      for (const verdict of written) {
        changedLotIds.add(verdict.lotId);
        candidates.push(...holdCandidates(verdict, channel));
      }
    }
  }
  const held = await holdLots(tx, candidates, [...changedLotIds], context);
  await deleteLooks(tx, judged);
  return { verdictCount, held };
}

/** The lots that were judged are no longer owed another look. */
async function deleteLooks(tx: Transaction, judged: JudgedChannel[]): Promise<void> {
  for (const { channelId, segments } of judged) {
    const lotIds = segments.flatMap(({ judgement }) => judgement.lots.map(({ lotId }) => lotId));
    await tx.raw('delete from lots_to_rejudge where channel_id = :channelId and lot_id = any(:lotIds)', {
      channelId,
      lotIds,
    });
  }
}

async function lockUnchanged(tx: Transaction, judged: JudgedChannel[]): Promise<void> {
  const current = await rows<{ id: number; version: number }>(
    tx,
    `select id, inputs_version as version from channels where id = any(:ids) order by id for update`,
    { ids: judged.map((channel) => channel.channelId) },
  );
  const versions = new Map(current.map((row) => [row.id, row.version]));
  const stale = judged.filter((channel) => versions.get(channel.channelId) !== channel.inputsVersion);
  if (stale.length > 0) throw new InputsChangedError(stale.map((channel) => channel.channelId));
}

async function insertFit(
  tx: Transaction,
  channel: JudgedChannel,
  { startsAt, inputHash, judgement }: JudgedChannel['segments'][number],
  context: { intakeId: number | null; methodVersion: string; at: Date },
): Promise<number> {
  const { fit } = judgement;
  const [row] = await tx('fits')
    .insert({
      plant_id: channel.plantId,
      channel_id: channel.channelId,
      plan_revision_id: channel.plan?.id ?? null,
      intake_id: context.intakeId,
      segment_starts_at: startsAt === null ? null : new Date(startsAt * 1000),
      lambda: fit && Number.isFinite(fit.lambda) ? fit.lambda : null,
      kappa: fit?.kappa ?? null,
      edf: fit?.edf ?? null,
      point_count: fit?.pointCount ?? null,
      lot_count: fit?.lotCount ?? null,
      movement: fit?.movement ?? null,
      start_level: judgement.startLevel ?? null,
      input_hash: inputHash,
      method_version: context.methodVersion,
      judged_at: context.at,
    })
    .returning<{ id: number }[]>('id');
  return row.id;
}

/** Draws the segment's baseline anew from its oldest judged lot on; older points stay as they were last fitted. */
async function replaceCurve(
  tx: Transaction,
  channel: JudgedChannel,
  { drawFrom, endsAt, judgement }: JudgedChannel['segments'][number],
  fitId: number,
): Promise<void> {
  const { t, value, standardError } = judgement.curve;
  if (t.length === 0) return;
  const bindings = {
    plantId: channel.plantId,
    channelId: channel.channelId,
    fitId,
    drawFrom,
    endsAt,
    t: [...t],
    value: [...value],
    standardError: [...standardError],
  };
  await tx.raw(
    `delete from baseline_points where channel_id = :channelId and at >= to_timestamp(:drawFrom)
       and (cast(:endsAt as float8) is null or at < to_timestamp(:endsAt))`,
    bindings,
  );
  await tx.raw(
    `insert into baseline_points (plant_id, channel_id, at, value, standard_error, fit_id)
     select distinct on (p.at) cast(:plantId as bigint), cast(:channelId as bigint), to_timestamp(p.at), p.value, p.standard_error, cast(:fitId as bigint)
     from unnest(cast(:t as float8[]), cast(:value as float8[]), cast(:standardError as float8[])) as p(at, value, standard_error)
     where p.at >= :drawFrom order by p.at
     on conflict (channel_id, at) do update set value = excluded.value, standard_error = excluded.standard_error, fit_id = excluded.fit_id`,
    bindings,
  );
}

interface WrittenVerdict extends LotJudgement {
  verdictId: number;
  formerState: string | null;
}

/** Adds a verdict for each lot whose verdict says something new or of which readings were superseded, and makes it the current one. */
async function insertVerdicts(
  tx: Transaction,
  channel: JudgedChannel,
  lots: LotJudgement[],
  fitId: number,
  at: Date,
): Promise<WrittenVerdict[]> {
  if (lots.length === 0) return [];
  const incoming = JSON.stringify(lots.map((lot) => verdictRecord(lot, channel)));
  const changed = await rows<{ lotId: number; formerId: number | null; formerState: string | null }>(
    tx,
    `select i.lot_id as "lotId", v.id as "formerId", v.control_state as "formerState"
     from jsonb_to_recordset(:incoming) as i(${RECORD}) join lot_channels lc on lc.channel_id = :channelId and lc.lot_id = i.lot_id
     left join verdicts v on v.channel_id = :channelId and v.lot_id = i.lot_id and v.is_current
     where v.id is null or exists (select 1 from lots_to_rejudge j where j.channel_id = :channelId and j.lot_id = i.lot_id and j.because = 'superseded')
       or v.reading_count <> lc.count or v.specification_id is distinct from lc.specification_id
       or (v.control_state, v.is_provisional, v.not_scored_reason, v.score, v.score_limit, v.lot_mean, v.specification_state, v.constant_state)
       is distinct from (i.control_state, i.is_provisional, i.not_scored_reason, i.score, i.score_limit, i.lot_mean, i.specification_state, i.constant_state)`,
    { incoming, channelId: channel.channelId },
  );
  if (changed.length === 0) return [];
  await tx.raw('update verdicts set is_current = false where id = any(:ids)', {
    ids: changed.flatMap((row) => (row.formerId === null ? [] : [row.formerId])),
  });
  const inserted = await rows<{ id: number; lotId: number }>(
    tx,
    `insert into verdicts (plant_id, channel_id, lot_id, fit_id, is_current, control_state, is_provisional, not_scored_reason, score, score_limit,
       residual, residual_sd, reading_count, lot_mean, baseline, control_low, control_high, specification_id, specification_state,
       constant_state, constant_low, constant_high, constant_score, judged_at)
     select :plantId, :channelId, i.lot_id, :fitId, true, i.control_state, i.is_provisional, i.not_scored_reason, i.score, i.score_limit,
       i.residual, i.residual_sd, lc.count, i.lot_mean, i.baseline, i.control_low, i.control_high, lc.specification_id, i.specification_state,
       i.constant_state, i.constant_low, i.constant_high, i.constant_score, :at
     from jsonb_to_recordset(:incoming) as i(${RECORD}) join lot_channels lc on lc.channel_id = :channelId and lc.lot_id = i.lot_id
     where i.lot_id = any(:lotIds) returning id, lot_id as "lotId"`,
    {
      plantId: channel.plantId,
      channelId: channel.channelId,
      fitId,
      incoming,
      at,
      lotIds: changed.map((row) => row.lotId),
    },
  );
  const byLot = new Map(lots.map((lot) => [lot.lotId, lot]));
  const former = new Map(changed.map((row) => [row.lotId, row.formerState]));
  const written = inserted.map(({ id, lotId }) => ({
    ...(byLot.get(lotId) as LotJudgement),
    verdictId: id,
    formerState: former.get(lotId) ?? null,
  }));
  await insertSignals(tx, channel, written);
  return written;
}

const RECORD = `lot_id bigint, control_state text, is_provisional boolean, not_scored_reason text, score float8, score_limit float8, residual float8,
  residual_sd float8, lot_mean float8, baseline float8, control_low float8, control_high float8, specification_state text,
  constant_state text, constant_low float8, constant_high float8, constant_score float8`;

function verdictRecord(lot: LotJudgement, channel: JudgedChannel) {
  return {
    lot_id: lot.lotId,
    control_state: lot.controlState,
    is_provisional: lot.isProvisional,
    not_scored_reason: lot.notScoredReason,
    score: lot.score,
    score_limit: channel.plan?.limit ?? null,
    residual: lot.residual,
    residual_sd: lot.residualSd,
    lot_mean: lot.lotMean,
    baseline: lot.baseline,
    control_low: lot.controlLow,
    control_high: lot.controlHigh,
    specification_state: lot.specificationState,
    constant_state: lot.constant.state,
    constant_low: lot.constant.low,
    constant_high: lot.constant.high,
    constant_score: lot.constant.score,
  };
}

async function insertSignals(tx: Transaction, channel: JudgedChannel, verdicts: WrittenVerdict[]): Promise<void> {
  const signals = verdicts.flatMap((verdict) =>
    verdict.signals.map((signal) => ({
      plant_id: channel.plantId,
      verdict_id: verdict.verdictId,
      signal: signal.signal,
      action: signal.action,
      facts: JSON.stringify(signal.facts),
    })),
  );
  if (signals.length > 0) await tx.batchInsert('verdict_signals', signals, 500);
}

/**
 * Signals of a verdict that hold its lot. A channel's first plan does not hold, for its control limits, lots that were made before
 * anybody approved it: they stand in its report and their verdicts.
 */
function holdCandidates(verdict: WrittenVerdict, channel: JudgedChannel): HoldCandidate[] {
  const { plan } = channel;
  return verdict.signals
    .filter((signal) => signal.action === 'holds')
    .map((signal) => ({
      lotId: verdict.lotId,
      channelId: channel.channelId,
      verdictId: verdict.verdictId,
      signal: signal.signal,
      facts: signal.facts,
      score: verdict.score,
      limit: plan?.limit ?? null,
      lotMean: verdict.lotMean,
      wasWithin: verdict.formerState === 'within_control_limits',
      onlyAfter:
        plan !== null &&
        plan.isFirst &&
        signal.signal !== 'outside_specification' &&
        signal.signal !== 'censored_readings'
          ? plan.approvedAt
          : null,
    }));
}

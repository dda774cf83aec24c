import type { SignalName } from '@app/contracts';
import type { Database } from '@app/data';
import { insertRow } from './insert';
import type { TestLot } from './lots';
import type { TestChannel, TestPlant } from './plant';

const JUDGED_AT = new Date('2026-03-11T07:00:00Z');

export async function insertFit(db: Database, plant: TestPlant, channelId: number, planId?: number): Promise<number> {
  return insertRow(db, 'fits', {
    plant_id: plant.id,
    channel_id: channelId,
    plan_revision_id: planId ?? null,
    input_hash: Buffer.from('inputs'),
    method_version: '1',
    judged_at: JUDGED_AT,
  });
}

export interface VerdictOptions {
  fitId: number;
  score?: number | null;
  notScoredReason?: string;
  isProvisional?: boolean;
  isCurrent?: boolean;
  specificationState?: string;
  constantState?: string;
  signals?: { signal: SignalName; action: 'holds' | 'notice' | 'off'; facts?: object }[];
}

/** A verdict by a score against a limit of 3, or not scored when the score is null. */
export async function insertVerdict(
  db: Database,
  plant: TestPlant,
  place: { channel: TestChannel; lot: TestLot },
  { fitId, score = 0.5, ...options }: VerdictOptions,
): Promise<number> {
  const { channel, lot } = place;
  const state = Math.abs(score ?? 0) > 3 ? 'outside_control_limits' : 'within_control_limits';
  const verdictId = await insertRow(db, 'verdicts', {
    plant_id: plant.id,
    channel_id: channel.id,
    lot_id: lot.id,
    fit_id: fitId,
    is_current: options.isCurrent ?? true,
    control_state: score === null ? 'not_scored' : state,
    is_provisional: options.isProvisional ?? false,
    not_scored_reason: score === null ? (options.notScoredReason ?? 'learning') : null,
    score,
    score_limit: score === null ? null : 3,
    residual: score === null ? null : score * 0.1,
    residual_sd: score === null ? null : 0.1,
    reading_count: 10,
    lot_mean: score === null ? channel.nominal : channel.nominal + score * 0.1,
    baseline: score === null ? null : channel.nominal,
    control_low: score === null ? null : channel.nominal - 0.3,
    control_high: score === null ? null : channel.nominal + 0.3,
    specification_id: channel.specificationId,
    specification_state: options.specificationState ?? 'inside_specification',
    constant_state: options.constantState ?? 'within_control_limits',
    constant_low: channel.nominal - 1,
    constant_high: channel.nominal + 1,
    constant_score: 0.2,
    judged_at: JUDGED_AT,
  });
  for (const { signal, action, facts } of options.signals ?? [])
    await db('verdict_signals').insert({
      plant_id: plant.id,
      verdict_id: verdictId,
      signal,
      action,
      facts: JSON.stringify(facts ?? {}),
    });
  return verdictId;
}

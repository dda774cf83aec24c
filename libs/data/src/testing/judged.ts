import type { LotJudgement } from '@app/scoring';
import type { JudgedChannel } from '../record-judgements';

/** A lot within its control limits at half a σ; what differs is told. */
export function judgedLot(lotId: number, differs: Partial<LotJudgement> = {}): LotJudgement {
  return {
    lotId,
    controlState: 'within_control_limits',
    isProvisional: false,
    notScoredReason: null,
    score: 0.5,
    residual: 0.05,
    residualSd: 0.1,
    lotMean: 60.05,
    baseline: 60,
    controlLow: 59.7,
    controlHigh: 60.3,
    specificationState: 'inside_specification',
    constant: { state: 'within_control_limits', low: 59, high: 61, score: 0.1 },
    signals: [],
    ...differs,
  };
}

/** A lot that its control limits hold. */
export const outsideLot = (lotId: number, differs: Partial<LotJudgement> = {}): LotJudgement =>
  judgedLot(lotId, {
    controlState: 'outside_control_limits',
    score: -4.3,
    residual: -0.43,
    lotMean: 59.57,
    signals: [{ signal: 'lot_mean', action: 'holds', facts: {} }],
    ...differs,
  });

/** A channel of one segment, judged as told. */
export function judgedChannel(
  channel: { channelId: number; plantId: number; inputsVersion: number; plan: JudgedChannel['plan'] },
  lots: LotJudgement[],
  curve: { t: number[]; value: number[] } = { t: [], value: [] },
): JudgedChannel {
  return {
    ...channel,
    segments: [
      {
        startsAt: null,
        endsAt: null,
        drawFrom: curve.t[0] ?? 0,
        inputHash: Buffer.from('inputs'),
        judgement: {
          fit: { lambda: Infinity, kappa: 0.5, edf: 2, pointCount: lots.length, lotCount: lots.length, movement: 0.1 },
          curve: {
            t: Float64Array.from(curve.t),
            value: Float64Array.from(curve.value),
            standardError: Float64Array.from(curve.t, () => 0.01),
          },
          lots,
          startLevel: 0.2,
        },
      },
    ],
  };
}

import { notScoredSentence, signalPhrase, type VerdictView } from '@app/contracts';
import type { VerdictRow } from '@app/data';

export function toVerdictView(row: VerdictRow): VerdictView {
  return {
    id: row.id,
    channel: {
      id: row.channelId,
      name: row.channelName,
      characteristic: { name: row.characteristicName, unit: row.unit, resolution: row.resolution },
      gaugeAssetNumber: row.gaugeAssetNumber ?? '',
    },
    controlState: row.controlState,
    isProvisional: row.isProvisional,
    notScoredSentence: row.notScoredReason === null ? null : notScoredSentence(row.notScoredReason),
    score: row.score,
    limit: row.limit,
    residual: row.residual,
    residualSd: row.residualSd,
    readingCount: row.readingCount,
    lotMean: row.lotMean,
    baseline: row.baseline,
    controlLow: row.controlLow,
    controlHigh: row.controlHigh,
    specificationState: row.specificationState,
    nominal: row.nominal,
    lowerSpecification: row.lower,
    upperSpecification: row.upper,
    constant: {
      state: row.constantState,
      low: row.constantLow,
      high: row.constantHigh,
      score: row.constantScore,
    },
    signals: row.signals.map(({ signal, action, facts }) => ({
      signal,
      action,
      sentence: sentenceOf(row, signal, facts),
    })),
    planRevision: row.planRevision,
    methodVersion: row.methodVersion,
    judgedAt: row.judgedAt.toISOString(),
  };
}

function sentenceOf(
  row: VerdictRow,
  signal: VerdictRow['signals'][number]['signal'],
  facts: VerdictRow['signals'][number]['facts'],
) {
  return signalPhrase({
    signal,
    channelName: row.channelName,
    unit: row.unit,
    resolution: row.resolution,
    score: row.score,
    limit: row.limit,
    lotMean: row.lotMean,
    lowerSpecification: row.lower,
    upperSpecification: row.upper,
    facts,
  });
}

import { formatMean, formatNumber, formatValue } from './format';
import type { Disposition, SignalName } from './states';

/** Facts of one signal on one channel, enough for its sentence. */
export interface SignalFacts {
  signal: SignalName;
  channelName: string;
  unit: string;
  resolution: number;
  score: number | null;
  limit: number | null;
  lotMean: number | null;
  lowerSpecification: number | null;
  upperSpecification: number | null;
  facts: Record<string, number | string | null>;
}

const lowerFirst = (text: string) => (/^[A-Z][a-z]/.test(text) ? text[0].toLowerCase() + text.slice(1) : text);

/** What a shift engineer would say of the signal, without the lot's name: "lies 4.3 σ below its baseline in coat weight". */
export function signalPhrase(facts: SignalFacts): string {
  const name = lowerFirst(facts.channelName);
  const size = { unit: facts.unit, resolution: facts.resolution };
  switch (facts.signal) {
    case 'lot_mean': {
      const score = facts.score ?? 0;
      const side = score < 0 ? 'below' : 'above';
      const limit = facts.limit ?? 0;
      const decimals = decimalsApart(Math.abs(score), limit);
      return `lies ${formatNumber(Math.abs(score), decimals)}\u202fσ ${side} its baseline in ${name} (control limit ${formatNumber(limit, decimals)}\u202fσ)`;
    }
    case 'outside_specification':
      return `is outside its specification in ${name}${specificationDetail(facts, size)}`;
    case 'not_scored':
      return `could not be scored in ${name}: ${notScoredSentence(String(facts.facts.reason ?? ''))}`;
    case 'censored_readings': {
      const low = Number(facts.facts.censoredLow ?? 0);
      const high = Number(facts.facts.censoredHigh ?? 0);
      return `has ${low + high} readings off the scale in ${name} (${low} at the low end, ${high} at the high end)`;
    }
    case 'baseline_moved':
      return `lies where the slow movement of ${name} has gone ${formatValue(Number(facts.facts.movement ?? 0), size)} since the baseline’s start${noticeClause(facts.facts.notice, size)}`;
  }
}

/** The plan's notice: how far the movement may go before it is pointed out. */
function noticeClause(notice: number | string | null | undefined, size: { unit: string; resolution: number }): string {
  return typeof notice === 'number' ? `; the plan points out more than ${formatValue(notice, size)}` : '';
}

/** One decimal, or as many more as it takes to see that the score is not the limit. */
function decimalsApart(score: number, limit: number): number {
  let decimals = 1;
  while (decimals < 4 && score !== limit && score.toFixed(decimals) === limit.toFixed(decimals)) decimals++;
  return decimals;
}

function specificationDetail(facts: SignalFacts, size: { unit: string; resolution: number }): string {
  const below = Number(facts.facts.countBelow ?? 0);
  const above = Number(facts.facts.countAbove ?? 0);
  const parts: string[] = [];
  const { lotMean, lowerSpecification: lower, upperSpecification: upper } = facts;
  if (lotMean !== null && lower !== null && lotMean < lower)
    parts.push(`lot mean ${formatMean(lotMean, size)} is below ${formatValue(lower, size)}`);
  if (lotMean !== null && upper !== null && lotMean > upper)
    parts.push(`lot mean ${formatMean(lotMean, size)} is above ${formatValue(upper, size)}`);
  if (below > 0 && lower !== null) parts.push(`${readings(below)} below ${formatValue(lower, size)}`);
  if (above > 0 && upper !== null) parts.push(`${readings(above)} above ${formatValue(upper, size)}`);
  return parts.length > 0 ? `: ${parts.join(', ')}` : '';
}

const readings = (count: number) => (count === 1 ? '1 reading' : `${count} readings`);

/** "Lot 24117 lies …; and is …": the reason of a hold as a sentence. */
export function holdReason(lotNumber: string, phrases: string[]): string {
  const [first, ...rest] = phrases;
  if (first === undefined) return `Lot ${lotNumber} is held.`;
  return `Lot ${lotNumber} ${[first, ...rest].join('; it also ')}.`;
}

/** Why a lot has no score, as a clause. */
export function notScoredSentence(reason: string): string {
  switch (reason) {
    case 'learning':
      return 'the baseline is still learning; too few lots are known since its start';
    case 'no_plan_in_force':
      return 'no plan is in force for this channel';
    case 'beyond_allowance':
      return 'the slow movement is beyond what the plan allows; check the gauge';
    case 'no_values':
      return 'the lot has no reading with a value';
    case 'censored':
      return 'readings off the scale are missing from its mean';
    case 'not_judged':
      return 'its readings have not been judged yet';
    case 'constant_data':
      return 'the readings since the baseline’s start are all the same';
    case 'non_finite':
      return 'its readings are not all finite numbers';
    default:
      return 'the baseline could not be computed from these readings';
  }
}

/** Gauge or process, as long as a channel has no gauge checks. */
export const NO_GAUGE_CHECKS =
  'No gauge checks: not corrected. Production readings alone cannot tell a moving gauge from a moving process.';

/** What a signature under a disposition means. */
export const SIGNATURE_MEANINGS: Record<Disposition, string> = {
  release: 'released',
  scrap: 'scrapped',
  rework: 'sent to rework',
  concession: 'released under concession',
  regrade: 'regraded',
};

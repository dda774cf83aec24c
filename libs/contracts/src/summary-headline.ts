import type { Measure, SummaryContent, SummaryGauge, SummaryOpenHold } from './api/summaries';
import {
  ageInWords,
  lotsInWords,
  measureInWords,
  paceInWords,
  percentInWords,
  quantitiesInWords,
  valueInWords,
  weeksToAllowance,
} from './summary-wording';

type Facts = Pick<SummaryContent, 'reminderHours' | 'total' | 'openHolds' | 'gauges' | 'notScored'>;

/**
 * The one thing that the director must know of a week, a sentence. What comes first wins: the oldest lot on hold beyond the director's
 * hours and not decided since; what is at risk on hold; a slow movement beyond its allowance, or soon there at its pace; lots without a score;
 * that all is decided.
 */
export function summaryHeadline(facts: Facts): string {
  const waiting = facts.openHolds.holds.filter((hold) => hold.decidedSince === null);
  if (waiting.length > 0) return holdsHeadline(facts, waiting);
  const beyond = facts.gauges.filter(isBeyondAllowance);
  if (beyond.length > 0) return allowanceHeadline(beyond);
  const [soon] = facts.gauges.filter(isSoonBeyondAllowance);
  if (soon !== undefined)
    return `No held lot waits, but the slow movement of ${soon.channel.name} on ${soon.line.name} has used ${paceInWords({ ...soon, share: soon.share ?? 0 })}.`;
  if (facts.total.week.notFullyScored > 0) return notScoredHeadline(facts);
  return quietHeadline(facts);
}

/** Whether lots of the channel go without a score because of its slow movement. */
export const isBeyondAllowance = ({ share }: SummaryGauge): boolean => share !== null && share > 1;

const SOON_WEEKS = 3;

/** Whether the slow movement grew by a tenth of its allowance or more, and at that pace uses it up within three weeks. */
export function isSoonBeyondAllowance(gauge: SummaryGauge): boolean {
  const weeks = weeksToAllowance(gauge);
  return gauge.isGettingWorse && weeks !== null && weeks <= SOON_WEEKS;
}

function holdsHeadline(facts: Facts, waiting: SummaryOpenHold[]): string {
  const [oldest] = waiting;
  const risk = atRisk(facts, waiting);
  const age = ageInWords(oldest.ageHours);
  if (oldest.ageHours < facts.reminderHours.director)
    return `${measureInWords(risk)} on hold ${risk.lots === 1 ? 'waits' : 'wait'} to be decided; the oldest had waited ${age} at the week’s end.`;
  const others = risk.lots - 1;
  const rest = others === 0 ? '' : others === 1 ? '; 1 more lot waits' : `; ${others} more lots wait`;
  return `Lot ${oldest.lot.number} of ${oldest.line.name} had been on hold for ${age} at the week’s end and is still undecided${rest}${riskClause(risk)}.`;
}

/** What still waits: what was open at the week's end without what was decided since. */
function atRisk({ total, openHolds }: Facts, waiting: SummaryOpenHold[]): Measure {
  if (waiting.length === openHolds.holds.length) return total.week.stillOpen;
  const sums = new Map<string, number>();
  for (const { quantity, quantityUnit } of waiting)
    if (quantity !== null && quantityUnit !== null) sums.set(quantityUnit, (sums.get(quantityUnit) ?? 0) + quantity);
  const values = waiting.flatMap(({ value }) => (value === null ? [] : [value]));
  const currency = total.week.stillOpen.value?.currency;
  return {
    lots: waiting.length + openHolds.count - openHolds.holds.length,
    quantities: [...sums].map(([unit, amount]) => ({ unit, amount })),
    lotsWithoutQuantity: waiting.filter(({ quantity }) => quantity === null).length,
    value:
      values.length === 0 || currency === undefined
        ? null
        : {
            amount: values.reduce((sum, value) => sum + value, 0),
            currency,
            lotsWithout: waiting.length - values.length,
          },
  };
}

function riskClause(risk: Measure): string {
  const quantity = quantitiesInWords(risk);
  if (quantity === '') return '';
  const value = valueInWords(risk);
  return `: ${quantity}${value === '' ? '' : ` (${value})`} at risk${risk.lots === 1 ? '' : ' in all'}`;
}

function allowanceHeadline(beyond: SummaryGauge[]): string {
  const [first] = beyond;
  const more = beyond.length === 1 ? '' : `; so has that of ${beyond.length - 1} more`;
  return `The slow movement of ${first.channel.name} on ${first.line.name} has gone beyond its allowance (${percentInWords(first.share ?? 0)} of it)${more}: lots there are not scored until the gauge is checked.`;
}

function notScoredHeadline({ total, notScored }: Facts): string {
  const { notFullyScored, measured } = total.week;
  const [most] = notScored;
  const why = most === undefined ? '' : `, most on ${most.channel.name} of ${most.line.name}: ${most.sentence}`;
  return `No held lot waits, but ${notFullyScored} of ${lotsInWords(measured.lots)} went without a score on a channel${why}.`;
}

function quietHeadline({ total, openHolds }: Facts): string {
  const { measured, held } = total.week;
  if (measured.lots === 0) return 'No lot was measured in this week, and none waits on hold.';
  const fate =
    held.lots === 0 && openHolds.count === 0
      ? 'No lot was held'
      : held.lots === 1
        ? 'The one held lot is decided'
        : 'All held lots are decided';
  return `${fate}, and ${measured.lots === 1 ? 'the one lot measured was' : `all ${measured.lots} lots measured were`} scored.`;
}

import {
  type DecidedMeasure,
  type Disposition,
  lotsInWords,
  type Measure,
  percentInWords,
  quantitiesInWords,
  type SummaryGauge,
  valueInWords,
  type ChangedLot,
  type ChangedLots,
} from '@app/contracts';
import { FATE_WORDS } from '../../shared/ui/mark-words';

/** What stands under a count of lots: quantity, value, and what states no quantity. */
export function measureDetail(measure: Measure): string {
  const without =
    measure.lotsWithoutQuantity > 0 && measure.quantities.length > 0
      ? `${lotsInWords(measure.lotsWithoutQuantity)} without a quantity`
      : '';
  return [quantitiesInWords(measure), valueInWords(measure), without].filter((part) => part !== '').join(', ');
}

/** "3 released" and "1 scrapped", each with its disposition. */
export const decidedParts = (decided: readonly DecidedMeasure[]) =>
  decided
    .filter(({ lots }) => lots > 0)
    .map(({ lots, disposition }) => ({ disposition, words: `${lots} ${FATE_WORDS[disposition]}` }));

/** "3 released, 1 scrapped"; "none". */
export function decidedWords(decided: readonly DecidedMeasure[]): string {
  const parts = decidedParts(decided).map(({ words }) => words);
  return parts.length === 0 ? 'none' : parts.join(', ');
}

/** "last week 4", "not measured last week". */
export const lastWeekWords = (count: number | null | undefined) =>
  count === null || count === undefined ? '' : `last week ${count}`;

/** How far a slow movement has gone, beside its bar. */
export function allowanceWords(gauge: SummaryGauge): string {
  if (gauge.share === null) return 'its plan states no allowance';
  const used = `${percentInWords(gauge.share)} of its allowance`;
  const before = gauge.lastWeekShare === null ? '' : `, ${percentInWords(gauge.lastWeekShare)} the week before`;
  if (gauge.share > 1) return `${used}${before}: beyond it, lots are not scored until the gauge is checked`;
  return `${used}${before}${gauge.isGettingWorse ? ': getting worse' : ''}`;
}

/** What became of a lot on which limits differ. */
export function changedFate({ hold }: ChangedLot): string {
  if (hold === null) return 'moved on, never held';
  if (hold.state === 'open') return 'held, undecided';
  return [...new Set(hold.dispositions)].map((disposition) => FATE_WORDS[disposition]).join(' and ');
}

const fateName = (fate: Disposition | 'held' | 'moved_on') =>
  fate === 'held' ? 'still held' : fate === 'moved_on' ? 'moved on' : FATE_WORDS[fate];

/** "Of these 3 moved on, 1 scrapped." */
export function fatesSentence({ fates }: ChangedLots): string {
  const parts = fates.filter(({ lots }) => lots > 0).map(({ fate, lots }) => `${lots} ${fateName(fate)}`);
  return parts.length === 0 ? '' : `Of these: ${parts.join(', ')}.`;
}

/** "12 lots, 9 the week before" */
export function countBeside(count: number, lastWeek: number | null): string {
  return `${lotsInWords(count)}${lastWeek === null ? '' : `, ${lastWeek} the week before`}`;
}

/** "The newest 50 of 61 are listed."; null when all are. */
export const cutSentence = (listed: number, count: number) =>
  listed < count ? `${listed} of ${count} are listed.` : null;

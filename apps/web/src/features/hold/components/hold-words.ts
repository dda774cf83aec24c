import { decimalsOf, formatNumber, type Disposition, type LotMark, type VerdictView } from '@app/contracts';
import { limitsText, scoreText } from '../../../shared/record/record-words';
import { CONTROL_WORDS, verdictWords } from '../../../shared/ui/mark-words';

/** What the decider presses: "Release lot 24117". */
const VERBS: Record<Disposition, string> = {
  release: 'Release',
  scrap: 'Scrap',
  rework: 'Send to rework',
  concession: 'Release under concession',
  regrade: 'Regrade',
};

export const decisionWords = (disposition: Disposition | null, lotNumber: string) =>
  disposition === null ? `Decide lot ${lotNumber}` : `${VERBS[disposition]} lot ${lotNumber}`;

/** What each disposition means for the lot, beside its choice. */
export const DISPOSITION_SENTENCES: Record<Disposition, string> = {
  release: 'Release: the lot moves on as it is.',
  scrap: 'Scrap: the lot is taken out for good and no longer pulls the baseline.',
  rework: 'Rework: the lot is worked over and measured again.',
  concession: 'Concession: the lot moves on although it does not conform.',
  regrade: 'Regrade: the lot moves on as another grade.',
};

/** A verdict's mark; the hold's own fate stands elsewhere on the page. */
export const markOf = (verdict: VerdictView): LotMark => ({
  controlState: verdict.controlState,
  isProvisional: verdict.isProvisional,
  specificationState: verdict.specificationState,
  hasNotice: verdict.signals.some((signal) => signal.action === 'notice'),
  holdState: null,
  disposition: null,
  isExcluded: false,
});

export function verdictText(verdict: VerdictView): string {
  const words = verdictWords(markOf(verdict));
  return verdict.notScoredSentence === null ? words : `${words}: ${verdict.notScoredSentence}`;
}

/** A verdict that led to the hold. */
export const isOffending = (verdict: VerdictView) => verdict.signals.some((signal) => signal.action === 'holds');

/** What limits on the unadjusted lot means would have said of the lot, as a sentence. */
export function constantSentence({ constant, channel }: VerdictView): string {
  const name = channel.characteristic.name.toLowerCase();
  if (constant.state === 'not_scored') {
    return `In ${name}, constant control limits could not have judged this lot.`;
  }
  const decimals = decimalsOf(channel.characteristic.resolution) + 1;
  const limits = limitsText(constant.low, constant.high, decimals);
  const figures = [
    limits !== null && `control limits ${limits}\u202f${channel.characteristic.unit}`,
    constant.score !== null && scoreText(constant.score),
  ].filter((part) => part !== false);
  const detail = figures.length > 0 ? ` (${figures.join('; ')})` : '';
  return `With the slow movement left in, ${name} would have been ${CONTROL_WORDS[constant.state]}${detail}.`;
}

export const quantityText = (quantity: number | null, unit: string | null) =>
  quantity === null ? null : `${formatNumber(quantity, Number.isInteger(quantity) ? 0 : 1)}\u202f${unit ?? ''}`.trim();

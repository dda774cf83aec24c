import {
  decimalsOf,
  formatNumber,
  type Characteristic,
  type LotMark,
  type LotView,
  type VerdictView,
} from '@app/contracts';
import { CONTROL_WORDS, SPECIFICATION_WORDS } from '../../shared/ui/mark-words';

/** "35.12 to 36.40", "at most 36.40", "at least 35.12"; a dash where there is neither. One unit, said elsewhere. */
export function rangeWords(low: number | null, high: number | null, decimals: number): string {
  if (low !== null && high !== null) return `${formatNumber(low, decimals)} to ${formatNumber(high, decimals)}`;
  if (high !== null) return `at most ${formatNumber(high, decimals)}`;
  return low === null ? '–' : `at least ${formatNumber(low, decimals)}`;
}

export const meanDecimals = (characteristic: Characteristic) => decimalsOf(characteristic.resolution) + 1;

/** The mark of one channel's verdict alone; hold and disposition are the lot's. */
export function verdictMark(verdict: VerdictView, lot: LotView): LotMark {
  return {
    controlState: verdict.controlState,
    isProvisional: verdict.isProvisional,
    specificationState: verdict.specificationState,
    hasNotice: verdict.signals.some((signal) => signal.action === 'notice'),
    holdState: null,
    disposition: null,
    isExcluded: lot.mark.isExcluded,
  };
}

/** Every sentence that this verdict has to say, the signals' own first. */
export function verdictSentences(verdict: VerdictView): { text: string; action: 'holds' | 'notice' | 'none' }[] {
  const told = verdict.signals
    .filter((signal) => signal.action !== 'off')
    .map((signal) => ({ text: sentence(signal.sentence), action: signal.action as 'holds' | 'notice' }));
  const isToldNotScored = verdict.signals.some((signal) => signal.signal === 'not_scored' && signal.action !== 'off');
  if (verdict.notScoredSentence !== null && !isToldNotScored) {
    return [...told, { text: `Not scored: ${verdict.notScoredSentence}.`.replace('..', '.'), action: 'none' }];
  }
  return told;
}

const sentence = (text: string) => {
  const capital = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(capital) ? capital : `${capital}.`;
};

/** Both halves of a verdict in words. */
export function bothVerdicts(verdict: VerdictView): string {
  const control = CONTROL_WORDS[verdict.controlState];
  const provisional = verdict.isProvisional && verdict.controlState !== 'not_scored' ? ', provisional' : '';
  return `${control}${provisional}; ${SPECIFICATION_WORDS[verdict.specificationState]}`;
}

/** What removing the slow movement changed for this lot; null when it changed nothing. */
export function disagreementWords(verdicts: readonly VerdictView[]): string | null {
  const names = (isOutsideNow: boolean) =>
    verdicts
      .filter(({ controlState, constant }) =>
        isOutsideNow
          ? controlState === 'outside_control_limits' && constant.state === 'within_control_limits'
          : controlState === 'within_control_limits' && constant.state === 'outside_control_limits',
      )
      .map((verdict) => verdict.channel.name.toLowerCase());
  const [missed, wrong] = [names(true), names(false)];
  const parts: string[] = [];
  if (missed.length > 0) parts.push(`A constant baseline would have passed it in ${missed.join(' and ')}.`);
  if (wrong.length > 0) parts.push(`A constant baseline would have called it out in ${wrong.join(' and ')}.`);
  return parts.length === 0 ? null : parts.join(' ');
}

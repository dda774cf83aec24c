import {
  decimalsOf,
  formatMean,
  formatNumber,
  type BreakKind,
  type BreakView,
  type Characteristic,
  type RecordLot,
} from '@app/contracts';
import { markWords } from '../ui/mark-words';

export const BREAK_WORDS: Record<BreakKind, string> = {
  adjustment: 'adjustment',
  gauge_change: 'gauge change',
  process_change: 'process change',
};

export const breakWords = ({ kind, reason }: Pick<BreakView, 'kind' | 'reason'>) => `${BREAK_WORDS[kind]}: ${reason}`;

/** A deviation with its sign, in the resolution's decimals. */
export function signed(value: number, resolution: number): string {
  return withSign(value, decimalsOf(resolution));
}

/** A rounded zero carries no sign. */
const withSign = (value: number, decimals: number) =>
  `${Number(value.toFixed(decimals)) > 0 ? '+' : ''}${formatNumber(value, decimals)}`;

export const scoreText = (score: number | null) => (score === null ? '–' : `${withSign(score, 1)}\u202fσ`);

/** Two limits as "41.90 … 42.50 g/m²", with a dash for one that is not there; null when there is neither. */
export function limitsText(low: number | null, high: number | null, decimals: number): string | null {
  if (low === null && high === null) return null;
  const text = (value: number | null) => (value === null ? '–' : formatNumber(value, decimals));
  return `${text(low)}\u202f…\u202f${text(high)}`;
}

/** One lot's figures in a line: what the pointer reads off the panes. */
export function lotFigures(lot: RecordLot, characteristic: Characteristic): string[] {
  const decimals = decimalsOf(characteristic.resolution) + 1;
  const figures: string[] = [];
  if (lot.mean !== null) figures.push(`mean ${formatMean(lot.mean, characteristic)}`);
  if (lot.baseline !== null) figures.push(`baseline ${formatMean(lot.baseline, characteristic)}`);
  const control = limitsText(lot.controlLow, lot.controlHigh, decimals);
  if (control !== null) figures.push(`control limits ${control}`);
  if (lot.score !== null) figures.push(`score ${scoreText(lot.score)}`);
  figures.push(markWords(lot.mark));
  return figures;
}

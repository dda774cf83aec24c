import { formatNumber } from '@app/contracts';

const MOST_DECIMALS = 6;

/** A reading with as many decimals as it was written with, so that a misread separator shows; binary crumbs beyond 12 digits are none. */
export function valueText(value: number | null, censoring: 'below' | 'above' | null): string {
  if (value === null) return censoring === 'below' ? 'off scale, low' : 'off scale, high';
  const written = String(Number(value.toPrecision(12)));
  return formatNumber(value, Math.min((written.split('.')[1] ?? '').length, MOST_DECIMALS));
}

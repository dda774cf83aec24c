import type { LocalDate, Measure, SummaryGauge } from './api/summaries';
import { formatNumber } from './format';

const NARROW_SPACE = '\u202f';

/** A quantity with its thousands apart, without needless decimals: "12 400 m", "312.5 kg". */
export function formatQuantity(amount: number, unit: string): string {
  const decimals = Math.abs(amount) >= 100 || Number.isInteger(amount) ? 0 : 1;
  const [whole, fraction] = formatNumber(amount, decimals).split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, NARROW_SPACE);
  return `${grouped}${fraction === undefined ? '' : `.${fraction}`}${NARROW_SPACE}${unit}`;
}

export const lotsInWords = (count: number): string => (count === 1 ? '1 lot' : `${count} lots`);

/** "2 100 m and 300 kg"; empty when no lot states a quantity. */
export function quantitiesInWords(measure: Measure): string {
  return measure.quantities.map(({ unit, amount }) => formatQuantity(amount, unit)).join(' and ');
}

/** "12 400 EUR", or with what it leaves out; empty when nothing is valued. */
export function valueInWords({ value }: Measure): string {
  if (value === null) return '';
  const amount = formatQuantity(Math.round(value.amount), value.currency);
  return value.lotsWithout === 0 ? amount : `${amount} without ${lotsInWords(value.lotsWithout)} of no stated value`;
}

/** "3 lots (2 100 m, 12 400 EUR)". */
export function measureInWords(measure: Measure): string {
  const parts = [quantitiesInWords(measure), valueInWords(measure)].filter((part) => part !== '');
  return parts.length === 0 ? lotsInWords(measure.lots) : `${lotsInWords(measure.lots)} (${parts.join(', ')})`;
}

/** An age in hours: "5 h", "2 d 4 h". */
export function ageInWords(hours: number): string {
  const whole = Math.floor(hours);
  if (whole < 1) return 'under an hour';
  const days = Math.floor(whole / 24);
  if (days === 0) return `${whole}${NARROW_SPACE}h`;
  const rest = whole % 24;
  return `${days}${NARROW_SPACE}d${rest === 0 ? '' : ` ${rest}${NARROW_SPACE}h`}`;
}

/** "under 8 h", "8 h to 1 d", "over 3 d". */
export function ageSpanInWords({ fromHours, toHours }: { fromHours: number; toHours: number | null }): string {
  if (toHours === null) return `over ${ageInWords(fromHours)}`;
  return fromHours === 0 ? `under ${ageInWords(toHours)}` : `${ageInWords(fromHours)} to ${ageInWords(toHours)}`;
}

/** A share in whole per cent. */
export const percentInWords = (share: number): string => `${formatNumber(share * 100, 0)}${NARROW_SPACE}%`;

type Shares = Pick<SummaryGauge, 'share' | 'lastWeekShare'>;

/**
 * Weeks until an allowance is used up if its slow movement goes on as since the week before: (1 − now) / (now − before), by shares. Null
 * when it did not grow, is used up already, or one of the shares is not known.
 */
export function weeksToAllowance({ share, lastWeekShare }: Shares): number | null {
  if (share === null || lastWeekShare === null || !(share < 1) || !(share > lastWeekShare)) return null;
  return (1 - share) / (share - lastWeekShare);
}

/** Further ahead nobody can see from two weeks. */
const MOST_WEEKS_AHEAD = 8;

/** "41 % of its allowance, 2 % the week before; at that pace it is used up within 2 weeks". */
export function paceInWords(gauge: Shares & { share: number }): string {
  const before = gauge.lastWeekShare === null ? '' : `, ${percentInWords(gauge.lastWeekShare)} the week before`;
  const weeks = weeksToAllowance(gauge);
  const left = weeks === null ? 0 : Math.max(1, Math.ceil(weeks));
  const pace =
    left === 0 || left > MOST_WEEKS_AHEAD
      ? ''
      : `; at that pace it is used up within ${left === 1 ? 'a week' : `${left} weeks`}`;
  return `${percentInWords(gauge.share)} of its allowance${before}${pace}`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** The seven days from a Monday: "23 to 29 Nov 2026", "28 Dec 2026 to 3 Jan 2027". */
export function weekInWords(startsOn: LocalDate): string {
  const [year, month, day] = startsOn.split('-').map(Number);
  const first = new Date(Date.UTC(year, month - 1, day));
  const last = new Date(Date.UTC(year, month - 1, day + 6));
  const whole = (date: Date) => `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}`;
  if (first.getUTCFullYear() !== last.getUTCFullYear()) return `${whole(first)} to ${whole(last)}`;
  if (first.getUTCMonth() !== last.getUTCMonth())
    return `${first.getUTCDate()} ${MONTHS[first.getUTCMonth()]} to ${whole(last)}`;
  return `${first.getUTCDate()} to ${whole(last)}`;
}

import type { ChannelContext } from '../types';
import { relateUnits, unitsLike } from './units';

/** A value as it stands in the workbook, with its row's product. */
export interface SampleValue {
  value: number;
  product: string | null;
}

/** One way of reading a column's numbers. */
export interface Interpretation {
  unit: string;
  isDeviation: boolean;
}

type Specification = NonNullable<ChannelContext['specifications']>[number];

/** Fewer values say nothing about a column. */
const LEAST = 3;
/** Widths of the specification beyond its limits within which a column's median is expected. */
const WIDTHS_BEYOND = 3;
/** Where only a nominal value is known, this share of it stands for the width. */
const SHARE_OF_NOMINAL = 0.2;

/** The specification that holds for a product; the only one where the row names no product. */
export function specificationOf(channel: ChannelContext, product: string | null): Specification | undefined {
  const all = channel.specifications ?? [];
  if (product !== null) return all.find((one) => one.product === product);
  return all.length === 1 ? all[0] : undefined;
}

/**
 * Whether a column's numbers, read in one way, lie where its characteristic is: the median of the distances from the middle
 * of the specification, in widths of it, is at most 3.5 (three widths beyond a limit).
 *
 * @returns null where fewer than three values have a specification
 */
export function fits(sample: readonly SampleValue[], channel: ChannelContext, as: Interpretation): boolean | null {
  const relation = relateUnits(as.unit, channel.unit);
  if (relation.kind !== 'same' && relation.kind !== 'convertible') return null;
  const convert = relation.kind === 'same' ? (value: number) => value : relation.conversion.convert;
  const distances: number[] = [];
  for (const { value, product } of sample) {
    const specification = specificationOf(channel, product);
    const band = specification && bandOf(specification);
    if (!band || (as.isDeviation && specification.nominal === null)) continue;
    const read = convert(value) + (as.isDeviation ? specification.nominal! : 0);
    distances.push((read - band.middle) / band.width);
  }
  if (distances.length < LEAST) return null;
  distances.sort((one, other) => one - other);
  return Math.abs(distances[Math.floor((distances.length - 1) / 2)]) <= 0.5 + WIDTHS_BEYOND;
}

function bandOf({ nominal, lower, upper }: Specification): { middle: number; width: number } | null {
  if (lower !== null && upper !== null) {
    return upper > lower ? { middle: (lower + upper) / 2, width: upper - lower } : null;
  }
  const limit = lower ?? upper;
  if (nominal === null) return null;
  const width = limit === null ? SHARE_OF_NOMINAL * Math.abs(nominal) : 2 * Math.abs(nominal - limit);
  return width > 0 ? { middle: nominal, width } : null;
}

/**
 * Other ways of reading a column's numbers in which they fit their characteristic, where they do not fit as they are read.
 *
 * @returns none where they fit, where nothing can be said, and where no other way fits better
 */
export function betterFits(
  sample: readonly SampleValue[],
  channel: ChannelContext,
  current: Interpretation,
): Interpretation[] {
  if (fits(sample, channel, current) !== false) return [];
  const units = new Set([current.unit, channel.unit, ...unitsLike(channel.unit)]);
  const found: Interpretation[] = [];
  for (const isDeviation of [false, true]) {
    for (const unit of units) {
      const isCurrent = unit === current.unit && isDeviation === current.isDeviation;
      const isSameUnit = unit === current.unit || unit === channel.unit;
      if (isCurrent || (isDeviation && !isSameUnit)) continue;
      if (fits(sample, channel, { unit, isDeviation })) found.push({ unit, isDeviation });
    }
  }
  return found;
}

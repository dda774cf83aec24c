import { lotMeanOf } from './lot-values';
import type { LotOnChannel, SpecificationState } from './types';

export interface SpecificationVerdict {
  state: SpecificationState;
  direction: 'below' | 'above' | 'both' | null;
  /** Sides on which a reading off the scale may be a nonconforming one. */
  mayHide: 'lower' | 'upper' | 'both' | null;
}

/**
 * Lot mean and every reading against the specification limits, as measured; a value on a limit is inside. While readings off
 * the scale may hide a nonconforming one, or there are no values, *inside* is not said: the state is then `no_specification`
 * (no verdict), and the censored_readings or not_scored signal tells why.
 */
export function specificationVerdict(lot: LotOnChannel): SpecificationVerdict {
  const { specification } = lot;
  if (specification === null) return { state: 'no_specification', direction: null, mayHide: null };
  const { lower, upper } = specification;
  const mean = lotMeanOf(lot);
  const isBelow = lower !== null && (lot.countBelow > 0 || (mean !== null && mean < lower));
  const isAbove = upper !== null && (lot.countAbove > 0 || (mean !== null && mean > upper));
  const mayHide = sides(
    lower !== null && lot.censoredLow > 0,
    upper !== null && lot.censoredHigh > 0,
    'lower',
    'upper',
  );
  const direction = sides(isBelow, isAbove, 'below', 'above');
  if (direction !== null) return { state: 'outside_specification', direction, mayHide };
  const hasLimit = lower !== null || upper !== null;
  const isInside = hasLimit && mean !== null && mayHide === null;
  return { state: isInside ? 'inside_specification' : 'no_specification', direction, mayHide };
}

function sides<A, B>(isFirst: boolean, isSecond: boolean, first: A, second: B): A | B | 'both' | null {
  if (isFirst && isSecond) return 'both';
  if (isFirst) return first;
  return isSecond ? second : null;
}

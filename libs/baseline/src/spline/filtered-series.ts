import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import { filterBackward, filterForward } from './filter-passes';
import { STATE_SIZE } from './information-state';
import { GainProducts } from './gain-products';

/** States before each point from both sides, and 1/lambda, in scaled units. */
export interface FilteredSeries {
  readonly series: PreparedSeries;
  readonly q: number;
  readonly forward: Float64Array;
  readonly backward: Float64Array;
  /** Products of the backward gains. Where there are none, a LotDeleter that needs them makes its own. */
  readonly gains?: GainProducts;
}

/** A filtered series whose states and gains are worked out when something asks for them, and kept. */
export class LazilyFiltered implements FilteredSeries {
  private forwardStates?: Float64Array;
  private backwardStates?: Float64Array;
  private gainProducts?: GainProducts;

  constructor(
    readonly series: PreparedSeries,
    readonly q: number,
  ) {}

  get forward(): Float64Array {
    if (this.forwardStates === undefined) {
      const { n, gap, pull, r } = this.series;
      this.forwardStates = new Float64Array(STATE_SIZE * n);
      filterForward(gap, pull, r, this.q, this.forwardStates);
    }
    return this.forwardStates;
  }

  get backward(): Float64Array {
    if (this.backwardStates === undefined) {
      const { n, gap, pull, r } = this.series;
      this.backwardStates = new Float64Array(STATE_SIZE * n);
      filterBackward(gap, pull, r, this.q, this.backwardStates);
    }
    return this.backwardStates;
  }

  get gains(): GainProducts {
    if (this.gainProducts === undefined) {
      this.gainProducts = new GainProducts(this.series.n);
      this.gainProducts.fill(this.series, this.q, this.forward);
    }
    return this.gainProducts;
  }
}

/** 1/lambda for scaled time and weight. @throws BaselineError unless lambda > 0 */
export function scaledInverse(series: PreparedSeries, lambda: number): number {
  if (!(lambda > 0))
    throw new BaselineError(Number.isNaN(lambda) ? 'non-finite' : 'bad-argument', 'lambda must be positive.');
  return ((series.timeScale * series.timeScale) / lambda) * series.timeScale * series.weightScale;
}

/** The error of a fit that overflows or underflows. */
export function outOfRange(lambda: number): BaselineError {
  return new BaselineError('ill-posed', `With lambda ${lambda} the fit leaves the range of double precision.`);
}

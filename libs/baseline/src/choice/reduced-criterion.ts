import type { PreparedSeries } from '../prepared-series';
import { scaledInverse } from '../spline/filtered-series';
import { determinantConstant, restrictedDeviance } from '../spline/restricted-likelihood';
import { generalisedCrossValidation, type Candidate } from './criteria';
import type { PenaltyRule } from './exact-criterion';
import { ReducedSolver } from './reduced-solver';
import { coarsened, reducedSystem, type ReducedSystem } from './reduced-system';
import type { Evaluate } from './search-lambda';

/** Fewest intervals of a basis. */
const FEWEST_INTERVALS = 64;
/** Fewest intervals for each degree of freedom of a penalty that is looked at. */
const LEAST_RATIO = 10;
/** Most intervals: enough for 1,600 degrees of freedom. */
const MOST_INTERVALS = 16384;
/** Fewest points an interval on average. */
const LEAST_POINTS = 2;
/** Degrees of freedom of points even in time: 1 + (lambda / sum w range^4 ...)^(-1/4) / (2 sqrt 2), from the eigenvalues ((j + 1/2) pi)^4 of a free beam. */
const EVEN_OFFSET = 1;
/** A sum of squares below this share of the line's has lost too many digits as a difference. */
const LEAST_RSS_SHARE = 1e-9;

/**
 * GCV and REML of penalised cubic B-splines on equal intervals, instead of the smoothing spline's own n functions: O(n) once, then O(intervals) a penalty.
 * The number of intervals, a power of two, is at least `ratio` times the degrees of freedom that the penalty has on points even in time (uneven points have
 * fewer: the density's mean fourth root is largest then), so a slow baseline is looked at on a coarse basis, where the normal equations keep their digits.
 */
export class ReducedCriterion {
  /** The smallest penalty for which the basis is fine enough. */
  readonly lowest: number;
  private readonly systems: ReducedSystem[];
  private readonly solver: ReducedSolver;
  private readonly range: number;
  private readonly weight: number;
  private readonly sumSquares: number;
  private logConstant: number | undefined;

  /** @param low the smallest penalty of interest, > 0 @param ratio intervals a degree of freedom where points suffice */
  constructor(
    private readonly series: PreparedSeries,
    low: number,
    private readonly ratio: number,
  ) {
    const { pullCount, lineRss, weightScale, pull, obs, timeScale } = series;
    const from = pull.findIndex((w) => w > 0);
    const to = pull.findLastIndex((w) => w > 0);
    this.range = (obs.t[to] - obs.t[from]) / timeScale;
    this.weight = pullCount;
    this.sumSquares = lineRss / weightScale;
    const most = Math.max(
      FEWEST_INTERVALS,
      Math.min(MOST_INTERVALS, 2 ** Math.floor(Math.log2(pullCount / LEAST_POINTS))),
    );
    const finest = Math.min(most, this.intervalsFor(low));
    this.systems = [reducedSystem(series, finest)];
    while (this.systems[0].intervals > FEWEST_INTERVALS) this.systems.unshift(coarsened(this.systems[0]));
    this.solver = new ReducedSolver(finest);
    const mostEdf = finest / LEAST_RATIO;
    this.lowest = this.penaltyOfEvenEdf(mostEdf);
  }

  /** Effective degrees of freedom on the basis that is fine enough for this penalty; NaN where it has lost its digits. */
  edfAt(lambda: number): number {
    return this.solver.solve(this.systemFor(lambda), this.scaled(lambda)) ? this.solver.edf : NaN;
  }

  /** The criterion on the basis that is fine enough for penalties from this one up. */
  evaluatorFrom(lambda: number, rule: PenaltyRule): Evaluate {
    const system = this.systemFor(lambda);
    return (at) => this.evaluate(system, at, rule);
  }

  private systemFor(lambda: number): ReducedSystem {
    const wanted = this.intervalsFor(lambda);
    return this.systems.find((s) => s.intervals >= wanted) ?? this.systems[this.systems.length - 1];
  }

  private evaluate(system: ReducedSystem, lambda: number, rule: PenaltyRule): Candidate {
    const { series, solver, sumSquares } = this;
    const scaled = this.scaled(lambda);
    const isSolved = solver.solve(system, scaled);
    const rss = sumSquares - 2 * solver.explained + solver.square;
    if (!(isSolved && rss > LEAST_RSS_SHARE * sumSquares)) return { smoothness: lambda, edf: NaN, value: NaN };
    const { edf } = solver;
    if (rule.rule === 'gcv') {
      const value = generalisedCrossValidation(series.pullCount, rss * series.weightScale, edf, rule.inflation);
      return { smoothness: lambda, edf, value };
    }
    if (rule.rule === 'lot-cv') return { smoothness: lambda, edf, value: NaN };
    this.logConstant ??= determinantConstant(series) + 2 * Math.log(this.range);
    const logDet = solver.logDet - (system.intervals + 1) * Math.log(scaled) + system.logConstant + this.logConstant;
    const prss = (sumSquares - solver.explained) * series.weightScale;
    const value = restrictedDeviance(series.pullCount, prss, logDet)[rule.variance];
    return { smoothness: lambda, edf, value };
  }

  /** lambda for time on [0, 1] between the first and last pulling point and scaled weights. */
  private scaled(lambda: number): number {
    return 1 / (scaledInverse(this.series, lambda) * this.range ** 3);
  }

  private intervalsFor(lambda: number): number {
    const edf = EVEN_OFFSET + (this.scaled(lambda) / this.weight) ** -0.25 / (2 * Math.SQRT2);
    return Math.max(FEWEST_INTERVALS, 2 ** Math.ceil(Math.log2(this.ratio * edf)));
  }

  private penaltyOfEvenEdf(edf: number): number {
    return ((2 * Math.SQRT2 * (edf - EVEN_OFFSET)) ** -4 * this.weight) / this.scaled(1);
  }
}

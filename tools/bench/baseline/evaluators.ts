import { ReducedCriterion } from '../../../libs/baseline/src/choice/reduced-criterion';
import { prepareSeries } from '../../../libs/baseline/src/prepared-series';
import { LambdaEvaluator } from '../../../libs/baseline/src/spline/lambda-evaluator';
import { longSeries } from '../../../libs/baseline/src/testing/long-series';
import { type AllocationFigures, measureAllocation } from './allocation';
import { fixedLambda } from './ours';

const SIZES = [3_000, 30_000];
/** Intervals of the reduced basis for each degree of freedom. */
const RATIO = 32;

/** What a candidate lambda allocates in the exact criterion and in the one on a reduced basis: the same at both sizes, when buffers are reused. */
export async function measureEvaluators(): Promise<AllocationFigures[]> {
  const figures: AllocationFigures[] = [];
  for (const n of SIZES) {
    const series = longSeries(n);
    const lambda = fixedLambda(series);
    const prepared = prepareSeries(series);
    const exact = new LambdaEvaluator(prepared);
    const onBasis = new ReducedCriterion(prepared, lambda, RATIO).evaluatorFrom(lambda, { rule: 'gcv', inflation: 1 });
    const points = `${n.toLocaleString('en')} points`;
    figures.push(
      await measureAllocation(`exact criterion, ${points}`, (candidate) => exact.evaluate(candidate), lambda),
      await measureAllocation(`criterion on a reduced basis, ${points}`, onBasis, lambda),
    );
  }
  return figures;
}

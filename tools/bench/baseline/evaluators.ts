import { LambdaEvaluator } from '../../../libs/baseline/src/spline/lambda-evaluator';
import { prepareSeries } from '../../../libs/baseline/src/prepared-series';
import { type AllocationFigures, measureAllocation } from './allocation';
import { fixedLambda } from './ours';
import { longSeries } from './series';

const SIZES = [3_000, 30_000];

/** What a candidate lambda allocates: the same at both sizes, when buffers are reused. */
export async function measureEvaluators(): Promise<AllocationFigures[]> {
  const figures: AllocationFigures[] = [];
  for (const n of SIZES) {
    const series = longSeries(n);
    const evaluator = new LambdaEvaluator(prepareSeries(series));
    const evaluate = (lambda: number) => evaluator.evaluate(lambda);
    figures.push(
      await measureAllocation(`exact criterion, ${n.toLocaleString('en')} points`, evaluate, fixedLambda(series)),
    );
  }
  return figures;
}

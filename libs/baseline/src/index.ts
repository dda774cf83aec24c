export { BaselineError, type BaselineErrorCode } from './baseline-error';
export { chooseLambda, type ChooseLambdaOptions, type ChosenLambda, type LambdaRule } from './choose-lambda';
export type { DeletedLot } from './deleted-lots';
export { effectivePeriod, lambdaForPeriod, pointDensity } from './drift-period';
export type { Observations } from './observations';
export { fitSmoothingSpline, type SmoothingSplineFit } from './smoothing-spline';

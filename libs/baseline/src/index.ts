export { BaselineError, type BaselineErrorCode } from './baseline-error';
export type {
  BaselineFit,
  BaselineMethod,
  BaselinePoint,
  BaselineSpec,
  DeletedLot,
  LotScores,
  PiecewiseCubic,
  StepEstimates,
} from './baseline-fit';
export { chooseAndFit, chooseBaseline } from './choice/choose-baseline';
export { chooseLambda, type ChooseLambdaOptions, type ChosenLambda, type LambdaRule } from './choice/choose-lambda';
export type { ChooseBaselineOptions, ChosenBaseline, SmoothnessBound, SmoothnessRule } from './choice/chosen-baseline';
export type { Candidate } from './choice/criteria';
export { effectivePeriod, lambdaForPeriod, pointDensity } from './drift-period';
export type { Observations } from './observations';
export { fitSmoothingSpline, type SmoothingSplineFit } from './spline/smoothing-spline';
export { fitBaseline } from './fit-baseline';
export { BandedLeastSquares } from './regression/banded-least-squares';
export { fitBSpline, fitConstant, fitNaturalSpline, fitPolynomial, MAX_DEGREE } from './regression/fit-regression';
export { mostKnots, placeKnots, type KnotPlacement, type PlaceKnotsOptions } from './regression/place-knots';
export type { PolynomialFit, Powers } from './regression/polynomial-fit';
export { quantileOfSorted } from './regression/quantile';
export { fitRobust, type FitRobustOptions, type RobustFit } from './robust/fit-robust';

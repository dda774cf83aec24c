export * from './types';
export { ScoringError } from './scoring-error';
export { DEFAULT_SIGNALS } from './default-signals';
export { mergeBlocks, pointCountFor, BLOCKS_PER_LOT } from './merge-blocks';
export type { Block } from './merge-blocks';
export { defaultShortestPeriod, medianLotSpacing } from './default-period';
export { proposePlan } from './propose-plan';
export type {
  PlanCaution,
  PlanCautionCode,
  PlanInput,
  PlanInsufficientReason,
  PlanProposal,
  PlanReport,
} from './plan-proposal';
export { judgeSegment } from './judge-segment';
export type { SegmentInput } from './segment-input';
export { METHOD_VERSION } from './version';

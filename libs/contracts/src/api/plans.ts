import type { PlanState } from '../states';
import type { Instant } from './common';

/** GET channels/:id/plans (items), plans/:id. */
export interface PlanView {
  id: number;
  channelId: number;
  channelName: string;
  lineId: number;
  lineName: string;
  plantId: number;
  unit: string;
  resolution: number;
  revision: number;
  state: PlanState;
  proposedBy: string | null;
  proposedAt: Instant | null;
  approvedBy: string | null;
  approvedAt: Instant | null;
  /** Why a draft could not be worked out; a sentence. */
  failure: string | null;
  reason: string;
  /** Null while it is still being worked out. */
  parameters: {
    method: 'smoothing_spline';
    shortestPeriodSeconds: number;
    effectivePeriodSeconds: number;
    windowSeconds: number;
    /** Outlying lots pull the baseline less (bisquare weights). */
    isRobust: boolean;
    betweenLotsSd: number;
    betweenPointsSd: number;
    betweenReadingsSd: number;
    scale: number;
    centre: number;
    limit: number;
    referenceLotCount: number;
    allowanceNotice: number | null;
    allowanceCap: number | null;
  } | null;
  /** Sentences to read before approving. */
  cautions: string[];
  leftOutLots: string[];
  mayApprove: boolean;
  whyNot: string | null;
}

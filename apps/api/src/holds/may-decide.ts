import { decisionRights, type HoldState, type HoldView, type Role } from '@app/contracts';

export interface HoldAuthority {
  state: HoldState;
  isForControlLimitsAlone: boolean;
  engineerMayRelease: boolean;
  /** Who confirmed an intake that a cause came from. */
  confirmerIds: number[];
}

/** What a person with these roles may decide of a hold now; of a decided one nothing. */
export function mayDecide(personId: number, roles: readonly Role[], hold: HoldAuthority): HoldView['mayDecide'] {
  if (hold.state === 'decided') return { dispositions: [], why: 'This hold is decided.' };
  return decisionRights({ ...hold, roles, hasConfirmedItsIntake: hold.confirmerIds.includes(personId) });
}

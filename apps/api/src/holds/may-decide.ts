import { decisionRights, type HoldState, type HoldView, type Role } from '@app/contracts';

export interface HoldAuthority {
  state: HoldState;
  isForControlLimitsAlone: boolean;
  engineerMayRelease: boolean;
  /** Who confirmed an intake that a cause came from. */
  confirmerIds: number[];
}

/** What a person with these roles may decide of a hold now; of one that has ended nothing. */
export function mayDecide(personId: number, roles: readonly Role[], hold: HoldAuthority): HoldView['mayDecide'] {
  if (hold.state === 'decided') return { dispositions: [], why: 'This hold is decided.' };
  if (hold.state === 'withdrawn')
    return { dispositions: [], why: 'This hold ended undecided: the intake that led to it was withdrawn.' };
  return decisionRights({ ...hold, roles, hasConfirmedItsIntake: hold.confirmerIds.includes(personId) });
}

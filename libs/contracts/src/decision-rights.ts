import type { Role } from './roles';
import type { Disposition } from './states';

/** What a person may decide of an open hold, and why not more. */
export interface DecisionRights {
  dispositions: Disposition[];
  why: string | null;
}

/**
 * The rule of who decides: quality managers anything; engineers a release, where the plant allows it, of a lot held for control limits
 * alone; nobody a hold that came from an intake which they confirmed.
 */
export function decisionRights(facts: {
  roles: readonly Role[];
  engineerMayRelease: boolean;
  isForControlLimitsAlone: boolean;
  hasConfirmedItsIntake: boolean;
}): DecisionRights {
  const { roles } = facts;
  const isManager = roles.includes('quality_manager');
  if (!isManager && !roles.includes('engineer'))
    return { dispositions: [], why: 'A quality manager decides held lots.' };
  if (!isManager && !facts.engineerMayRelease)
    return { dispositions: [], why: 'A quality manager decides held lots at this plant.' };
  if (!isManager && !facts.isForControlLimitsAlone)
    return {
      dispositions: [],
      why: 'This lot is held for more than its control limits: a quality manager decides it.',
    };
  if (facts.hasConfirmedItsIntake)
    return { dispositions: [], why: 'You confirmed the intake that this hold came from: somebody else decides it.' };
  return { dispositions: isManager ? ['release', 'scrap'] : ['release'], why: null };
}

import type { DecisionView } from '@app/contracts';
import { When } from '../../../shared/ui/when';

/** The signature under a decision: printed name, time, and what it means. */
export function Signature({ decision }: { decision: DecisionView }) {
  return (
    <div className="signature" role="status">
      <p className="signature__reason">{decision.reason}</p>
      {decision.note !== null && <p>{decision.note}</p>}
      <p className={`signature__line fate--${decision.disposition}`}>
        <b>{decision.by}</b>, <When at={decision.at} />: {decision.meaning}
      </p>
    </div>
  );
}

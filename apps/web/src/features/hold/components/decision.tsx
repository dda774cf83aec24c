import type { HoldView } from '@app/contracts';
import { Sheet } from '../../../shared/ui/sheet';
import { DecisionForm } from './decision-form';
import { Signature } from './signature';

/** The decision: its signature once it is taken, its form for who may take it, and else why not. */
export function Decision({ hold, onReadAgain }: { hold: HoldView; onReadAgain: () => void }) {
  const { dispositions, why } = hold.mayDecide;
  return (
    <Sheet title="Decision" tone="sign" margin={<DecisionMargin />}>
      {hold.decision !== null ? (
        <Signature decision={hold.decision} />
      ) : dispositions.length > 0 ? (
        <DecisionForm hold={hold} onReadAgain={onReadAgain} />
      ) : (
        <p>{why ?? 'Your roles at this plant do not decide holds.'}</p>
      )}
    </Sheet>
  );
}

function DecisionMargin() {
  return (
    <>
      <h3>Who decides</h3>
      <p>
        The quality manager; for control limits alone also an engineer, where the plant allows it. Nobody decides a hold
        from an intake which they confirmed.
      </p>
      <p>Safety-related and regulated characteristics follow the plant’s own procedures first.</p>
    </>
  );
}

import type { HoldView } from '@app/contracts';
import { Sheet } from '../../../shared/ui/sheet';
import { DecisionForm } from './decision-form';
import { Signature } from './signature';

/** The decision: its signature once it is taken, its form for who may take it, and else why not. */
export function Decision({ hold, onReadAgain }: { hold: HoldView; onReadAgain: () => void }) {
  const { dispositions, why } = hold.mayDecide;
  return (
    <Sheet title="Decision" tone="sign">
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

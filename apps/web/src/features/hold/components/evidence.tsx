import type { HoldView } from '@app/contracts';
import { Sheet } from '../../../shared/ui/sheet';
import { EvidenceTable } from './evidence-table';
import { constantSentence, isOffending } from './hold-words';
import { NeighboursChart } from './neighbours-chart';

/** The figures behind the hold, the lot amid its neighbours, and what can be said of gauge and process. */
export function Evidence({ hold }: { hold: HoldView }) {
  const offending = hold.verdicts.filter(isOffending);
  const charted = offending.filter((verdict) => verdict.score !== null);
  return (
    <>
      <Sheet title="Evidence" isFlush>
        <EvidenceTable verdicts={hold.verdicts} lotNumber={hold.lot.number} />
        {charted.map((verdict) => (
          <NeighboursChart key={verdict.id} hold={hold} verdict={verdict} />
        ))}
      </Sheet>
      <Sheet
        title="Gauge or process?"
        margin={
          <p>A baseline from production readings alone cannot see a process that moves as slowly as the gauge.</p>
        }
      >
        <p>{hold.attribution}</p>
        {offending.map((verdict) => (
          <p key={verdict.id}>{constantSentence(verdict)}</p>
        ))}
      </Sheet>
    </>
  );
}

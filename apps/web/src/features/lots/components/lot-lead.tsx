import type { LotView } from '@app/contracts';
import { fateWords, verdictWords } from '../../../shared/ui/mark-words';
import { When } from '../../../shared/ui/when';
import { quantityWords } from '../quantity-words';

/** The lot in two lines: what became of it, and what it is. */
export function LotLead({ lot }: { lot: LotView }) {
  const fate = fateWords(lot.mark);
  const verdict = verdictWords(lot.mark);
  return (
    <>
      <p className="lot-lead__verdict">
        {fate === null ? upperFirst(verdict) : `${upperFirst(fate)}: ${verdict}`}
        {lot.mark.isExcluded && '; excluded, so it does not pull the baseline'}.
      </p>
      <p>
        {lot.product} on {lot.line.name}, <When at={lot.startsAt} /> to <When at={lot.endsAt} form="time" />
        {lot.quantity !== null && `, ${quantityWords(lot)}`}.
      </p>
    </>
  );
}

const upperFirst = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

import type { HoldView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FATE_WORDS } from '../../../shared/ui/mark-words';
import { When } from '../../../shared/ui/when';

/** Lots held for the same cause before, and what became of them. */
export function SimilarLots({ similar }: { similar: HoldView['similar'] }) {
  if (similar.length === 0) return <EmptyNote>No lot was held for the same cause before.</EmptyNote>;
  return (
    <ul className="sentences">
      {similar.map((item) => (
        <li key={item.holdId}>
          <Link to={urls.hold(item.holdId)}>Lot {item.lotNumber}</Link> {withoutName(item)}{' '}
          <span className={`fate fate--${item.disposition}`}>
            {FATE_WORDS[item.disposition]} <When at={item.decidedAt} form="day" />
          </span>
        </li>
      ))}
    </ul>
  );
}

/** The reason without the lot's name, which the link says already. */
function withoutName({ sentence, lotNumber }: HoldView['similar'][number]): string {
  const name = `Lot ${lotNumber} `;
  return sentence.startsWith(name) ? sentence.slice(name.length) : sentence;
}

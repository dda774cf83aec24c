import type { LotView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { When } from '../../../shared/ui/when';

export function LotHistory({ lot }: { lot: LotView }) {
  if (lot.history.length === 0) return <EmptyNote>Nothing is recorded of this lot yet.</EmptyNote>;
  return (
    <>
      <ol className="history">
        {lot.history.map((entry, index) => (
          <li key={index} className="history__entry">
            <span className="history__when soft">
              <When at={entry.at} form="short" />
            </span>
            <span>
              {entry.sentence}
              {entry.by !== null && <span className="soft"> {entry.by}</span>}
            </span>
          </li>
        ))}
      </ol>
      {lot.holds.length > 1 && (
        <p className="history__holds">
          Held {lot.holds.length} times:{' '}
          {lot.holds.map((hold, index) => (
            <span key={hold.id}>
              {index > 0 && ', '}
              <Link to={urls.hold(hold.id)}>
                <When at={hold.openedAt} form="short" /> ({hold.state})
              </Link>
            </span>
          ))}
        </p>
      )}
    </>
  );
}

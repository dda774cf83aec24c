import type { HistoryEntry } from '@app/contracts';
import { When } from '../../../shared/ui/when';

/** Who did what, and when. */
export function History({ entries }: { entries: readonly HistoryEntry[] }) {
  return (
    <ul className="sentences">
      {entries.map((entry) => (
        <li key={`${entry.at} ${entry.sentence}`}>
          <span className="soft">
            <When at={entry.at} form="short" />
            {entry.by !== null && !entry.sentence.includes(entry.by) && `, ${entry.by}:`}
          </span>{' '}
          {entry.sentence}
        </li>
      ))}
    </ul>
  );
}

import type { DeskGroup, DeskItem } from '@app/contracts';
import { useId } from 'react';
import { ActionLink } from '../../../shared/ui/action';
import { GROUP_WORDS } from '../groups';

/** One group of the desk: sentences, each with the one action that ends it. */
export function DeskGroupList({ group, items }: { group: DeskGroup; items: DeskItem[] }) {
  const titleId = useId();
  return (
    <section className="desk-group" aria-labelledby={titleId}>
      <h2 className="desk-group__word" id={titleId}>
        {GROUP_WORDS[group]}
      </h2>
      <ul className="desk-group__items">
        {items.map((item) => (
          <li key={`${item.action.path} ${item.sentence}`} className="desk-item">
            <p className="desk-item__sentence">{item.sentence}</p>
            <ActionLink kind="quiet" to={item.action.path} label={`${item.action.label}: ${item.sentence}`}>
              {item.action.label}
            </ActionLink>
          </li>
        ))}
      </ul>
    </section>
  );
}

import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import type { Readiness, SectionKey } from '../readiness';

const WHERE: Record<SectionKey, string> = {
  plant: 'The plant',
  lines: 'Lines and shifts',
  products: 'Products',
  characteristics: 'Characteristics',
  specifications: 'Specifications',
  gauges: 'Gauges',
  channels: 'Channels',
  people: 'People',
};

/** What is missing, then what is there, a sentence each, with the way to where it is seen to. */
export function ReadinessList({ plantId, items }: { plantId: number; items: readonly Readiness[] }) {
  const groups = [
    { word: 'Missing', found: items.filter(({ isThere }) => !isThere) },
    { word: 'In place', found: items.filter(({ isThere }) => isThere) },
  ].filter(({ found }) => found.length > 0);
  return groups.map(({ word, found }) => (
    <section key={word} className="readiness" aria-label={word}>
      <h2 className="readiness__word">{word}</h2>
      <ul className="readiness__items">
        {found.map(({ section, sentence }) => (
          <li key={sentence} className="readiness__item">
            <span className={word === 'Missing' ? undefined : 'soft'}>{sentence}</span>
            <Link to={section === 'people' ? urls.people(plantId) : urls.setUp(plantId, section)}>
              {WHERE[section]}
            </Link>
          </li>
        ))}
      </ul>
    </section>
  ));
}

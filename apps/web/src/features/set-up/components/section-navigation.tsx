import { NavLink } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import type { Section } from '../sections';

/** The parts of a plant's set-up, in the order in which a new plant goes through them. */
export function SectionNavigation({ plantId, sections }: { plantId: number; sections: readonly Section[] }) {
  const { can } = useSession();
  return (
    <nav className="set-up-nav" aria-label="Parts of the set-up">
      <NavLink to={urls.setUp(plantId)} end>
        Readiness
      </NavLink>
      {sections.map(({ key, name }) => (
        <NavLink key={key} to={urls.setUp(plantId, key)}>
          {name}
        </NavLink>
      ))}
      {can('set_up_plant') && <NavLink to={urls.people(plantId)}>People</NavLink>}
    </nav>
  );
}

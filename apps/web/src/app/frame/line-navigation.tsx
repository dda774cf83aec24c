import { NavLink } from 'react-router-dom';
import { useLine } from '../../shared/line-context/line-context';
import { urls } from '../urls';

/** Within a line, in plain words. */
export function LineNavigation() {
  const { line } = useLine();
  if (line === null) return null;
  return (
    <nav className="line-navigation" aria-label={line.name}>
      <span className="line-navigation__line">{line.name}</span>
      <NavLink to={urls.desk()} end>
        Desk
      </NavLink>
      <NavLink to={urls.intakes(line.id)}>Intake</NavLink>
      <NavLink to={urls.lots({ line: line.id })}>Lots</NavLink>
      <NavLink to={urls.channels(line.id)}>Channels</NavLink>
    </nav>
  );
}

import { Link, NavLink, useLocation } from 'react-router-dom';
import { useLine } from '../../shared/line-context/line-context';
import { useSession } from '../../shared/session/session';
import { urls } from '../urls';
import { heldWords, sameForLine } from './other-line';

/** Below the tape: the chosen line's pages in plain words, and the other lines with what is held on them. */
export function LineNavigation() {
  const { line, lines } = useLine();
  const { plant, can } = useSession();
  const location = useLocation();
  if (line === null) return null;
  const others = lines.filter((other) => other.id !== line.id);
  return (
    <div className="line-bar">
      <nav className="line-bar__pages" aria-label={`Pages of ${line.name}`}>
        <span className="line-bar__line">
          {line.name}
          {line.heldCount > 0 && <span className="line-bar__held"> {heldWords(line.heldCount)}</span>}
        </span>
        <NavLink to={urls.desk()} end>
          Desk
        </NavLink>
        <NavLink to={urls.intakes(line.id)}>Intake</NavLink>
        <NavLink to={urls.lots({ line: line.id })}>Lots</NavLink>
        <NavLink to={urls.channels(line.id)}>Channels</NavLink>
        {can('read_summary') && <NavLink to={urls.summaries(plant.id)}>Summary</NavLink>}
      </nav>
      {others.length > 0 && (
        <nav className="line-bar__others" aria-label="Other lines">
          {others.map((other) => (
            <Link key={other.id} to={sameForLine(location, other.id)}>
              {other.name}
              <span className={other.heldCount > 0 ? 'line-bar__held' : 'soft'}> {heldWords(other.heldCount)}</span>
            </Link>
          ))}
        </nav>
      )}
    </div>
  );
}

import { Link } from 'react-router-dom';
import { useSession } from '../../shared/session/session';
import { Action } from '../../shared/ui/action';
import { urls } from '../urls';
import { PlantChoice } from './plant-choice';
import { ThemeChoice } from './theme-choice';

/** One row; two on a phone: where and who one is, then where one can go. */
export function Header() {
  const { me, plant, can, signOut } = useSession();
  const pages = [
    { name: 'Audit', to: urls.audit(plant.id), isOpen: can('read_audit') },
    { name: 'Mail', to: urls.mails(plant.id), isOpen: can('set_up_plant') },
    { name: 'Set-up', to: urls.setUp(plant.id), isOpen: can('propose_specification') },
    { name: 'People', to: urls.people(plant.id), isOpen: can('set_up_plant') },
  ].filter(({ isOpen }) => isOpen);
  return (
    <header className="header">
      <Link className="header__name" to={urls.desk()} aria-label="Ebbline, to the desk">
        Ebbline
      </Link>
      <div className="header__who">
        {me.mailCatcherUrl !== null && (
          <a href={me.mailCatcherUrl} target="_blank" rel="noreferrer">
            Caught mail
          </a>
        )}
        <PlantChoice />
        <Link className="header__person" to={urls.profile()} aria-label={`${me.name}, your profile`}>
          {me.name}
        </Link>
      </div>
      {pages.length > 0 && (
        <nav className="header__pages" aria-label="More pages">
          {pages.map(({ name, to }) => (
            <Link key={name} to={to}>
              {name}
            </Link>
          ))}
        </nav>
      )}
      <div className="header__tools">
        <ThemeChoice />
        <Action kind="plain" onPress={() => void signOut()}>
          Sign out
        </Action>
      </div>
    </header>
  );
}

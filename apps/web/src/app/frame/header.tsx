import { Link } from 'react-router-dom';
import { useSession } from '../../shared/session/session';
import { Action } from '../../shared/ui/action';
import { urls } from '../urls';
import { PlantChoice } from './plant-choice';
import { ThemeChoice } from './theme-choice';

export function Header() {
  const { me, plant, can, signOut } = useSession();
  return (
    <header className="header">
      <Link className="header__name" to={urls.desk()} aria-label="Ebbline, to the desk">
        Ebbline
      </Link>
      <div className="header__right">
        {me.mailCatcherUrl !== null && (
          <a className="header__mail" href={me.mailCatcherUrl} target="_blank" rel="noreferrer">
            Caught mail
          </a>
        )}
        <PlantChoice />
        {can('read_audit') && <Link to={urls.audit(plant.id)}>Audit</Link>}
        {can('set_up_plant') && <Link to={urls.mails(plant.id)}>Mail</Link>}
        {can('propose_specification') && <Link to={urls.setUp(plant.id)}>Set-up</Link>}
        {can('set_up_plant') && <Link to={urls.people(plant.id)}>People</Link>}
        <Link className="header__person" to={urls.profile()} aria-label={`${me.name}, your profile`}>
          {me.name}
        </Link>
        <ThemeChoice />
        <Action kind="plain" onPress={() => void signOut()}>
          Sign out
        </Action>
      </div>
    </header>
  );
}

import { PERMISSIONS, ROLE_NAMES, type Permission } from '@app/contracts';
import { Outlet, useParams } from 'react-router-dom';
import { useSession } from '../shared/session/session';
import { ActionLink } from '../shared/ui/action';
import { PageHeading } from '../shared/ui/page-heading';
import { Sheet } from '../shared/ui/sheet';
import { urls } from './urls';

/**
 * Keeps a page of a plant from who has no role there that opens it, and says whose it is: the server would refuse each of its parts. At a
 * plant where somebody has no role at all the page asks, and is answered that there is no such plant.
 */
export function MayOpen({ permission, title }: { permission: Permission; title: string }) {
  const plantId = Number(useParams().plantId);
  const { me } = useSession();
  const membership = me.memberships.find(({ plant }) => plant.id === plantId);
  if (membership === undefined || membership.permissions.includes(permission)) return <Outlet />;
  return (
    <>
      <PageHeading title={title} />
      <Sheet>
        <p role="alert">
          This page of {membership.plant.name} is for {listed(PERMISSIONS[permission].map((role) => ROLE_NAMES[role]))}.
          You are {listed(membership.roles.map((role) => ROLE_NAMES[role]))} there; an administrator gives roles.
        </p>
        <div className="form__actions">
          <ActionLink to={urls.desk()}>Go to the desk</ActionLink>
        </div>
      </Sheet>
    </>
  );
}

/** "quality engineer, quality manager and plant director" */
const listed = (names: string[]): string =>
  names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;

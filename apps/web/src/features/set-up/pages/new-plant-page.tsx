import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useAuth } from '../../../shared/session/auth';
import { useSession } from '../../../shared/session/session';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { NewPlantForm } from '../components/new-plant-form';
import '../set-up.css';

/** What is the new plant called, and which clock does it keep? */
export function NewPlantPage() {
  const { me, choosePlant } = useSession();
  const { readMeAgain } = useAuth();
  const navigate = useNavigate();
  const mayMake =
    me.isInstallationAdministrator || me.memberships.some(({ permissions }) => permissions.includes('set_up_plant'));
  return (
    <>
      <PageHeading
        title="A new plant"
        lead="Its name and its clock come first; everything else follows on the pages of its set-up."
      />
      <Sheet margin={<p>You become its administrator. Nobody else sees anything of it until you give them a role.</p>}>
        {mayMake ? (
          <NewPlantForm
            onMade={async ({ id }) => {
              await readMeAgain();
              choosePlant(id);
              void navigate(urls.setUp(id));
            }}
          />
        ) : (
          <EmptyNote>An administrator makes new plants. Your roles do not include that.</EmptyNote>
        )}
      </Sheet>
    </>
  );
}

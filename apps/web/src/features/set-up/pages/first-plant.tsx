import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useAuth } from '../../../shared/session/auth';
import { Sheet } from '../../../shared/ui/sheet';
import { NewPlantForm } from '../components/new-plant-form';
import '../set-up.css';

/** The installation's first plant, made before there is any to show. */
export function FirstPlant() {
  const { readMeAgain } = useAuth();
  const navigate = useNavigate();
  return (
    <Sheet margin={<p>You become its administrator. Nobody else sees anything of it until you give them a role.</p>}>
      <NewPlantForm
        onMade={async ({ id }) => {
          void navigate(urls.setUp(id));
          await readMeAgain();
        }}
      />
    </Sheet>
  );
}

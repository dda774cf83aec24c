import { urls } from '../../../app/urls';
import { useLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { ActionLink } from '../../../shared/ui/action';

/** Empty is a good state. */
export function EmptyDesk() {
  const { can } = useSession();
  const { line } = useLine();
  return (
    <div className="desk-empty">
      <p className="desk-empty__word">Nothing waits for you.</p>
      <p className="soft">
        Held lots, workbooks that need attention and plans to approve appear here by themselves, the oldest first.
      </p>
      {line !== null && can('upload_intake') && (
        <ActionLink kind="quiet" to={urls.intakes(line.id)}>
          Upload a shift’s readings of {line.name}
        </ActionLink>
      )}
    </div>
  );
}

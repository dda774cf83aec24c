import { useAuth } from '../shared/session/auth';
import { Action } from '../shared/ui/action';
import { PageHeading } from '../shared/ui/page-heading';

/** For a person who has no role at any plant. */
export function NoPlant() {
  const { signOut } = useAuth();
  return (
    <main className="page">
      <PageHeading
        title="No plant yet"
        lead="You have no role at any plant, so there is nothing to show. An administrator can give you one."
      />
      <Action kind="quiet" onPress={() => void signOut()}>
        Sign out
      </Action>
    </main>
  );
}

import { lazy, Suspense } from 'react';
import { useAuth } from '../shared/session/auth';
import { Action } from '../shared/ui/action';
import { PageHeading } from '../shared/ui/page-heading';
import { Skeleton } from '../shared/ui/skeleton';

const FirstPlant = lazy(async () => ({
  default: (await import('../features/set-up/pages/first-plant')).FirstPlant,
}));

/** For a person who has no role at any plant: who began the installation makes its first one. */
export function NoPlant() {
  const { state, signOut } = useAuth();
  const mayMake = state.kind === 'signed_in' && state.me.isInstallationAdministrator;
  return (
    <main className="page">
      <PageHeading
        title={mayMake ? 'The first plant' : 'No plant yet'}
        lead={
          mayMake
            ? 'Nothing is set up yet. Begin with the plant’s name and its clock; everything else follows on the pages of its set-up.'
            : 'You have no role at any plant, so there is nothing to show. An administrator can give you one.'
        }
      />
      {mayMake && (
        <Suspense fallback={<Skeleton lines={3} />}>
          <FirstPlant />
        </Suspense>
      )}
      <Action kind="quiet" onPress={() => void signOut()}>
        Sign out
      </Action>
    </main>
  );
}

import type { ApiTokenView, MembershipView, NewApiToken } from '@app/contracts';
import { useState } from 'react';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { useApiTokens } from '../api/api-tokens';
import { ApiTokenForm } from './api-token-form';
import { ApiTokenTable } from './api-token-table';
import { NewApiTokenNote } from './new-api-token-note';
import { RevokeQuestion } from './revoke-question';

/** By what may a script or a line computer send workbooks in my name? */
export function ApiTokens({ plant }: { plant: MembershipView['plant'] }) {
  const query = useApiTokens(plant.id);
  const [made, setMade] = useState<NewApiToken | null>(null);
  const [leaving, setLeaving] = useState<ApiTokenView | null>(null);
  return (
    <Sheet
      title={`API tokens at ${plant.name}`}
      margin={
        <p>
          With a token a script or a line computer sends workbooks to this plant in your name, and asks what became of
          them. It opens nothing else. It ends when it is revoked, when you are disabled, or when you may not upload
          here any more.
        </p>
      }
    >
      <div className="profile__tokens">
        <Loaded
          query={query}
          failure="Your API tokens could not be loaded."
          isEmpty={(tokens) => tokens.length === 0}
          empty={<EmptyNote>You have no API token here. Make one for each computer that sends workbooks.</EmptyNote>}
        >
          {(tokens) => <ApiTokenTable tokens={tokens} plant={plant} onRevoke={setLeaving} />}
        </Loaded>
        {leaving !== null && (
          <RevokeQuestion key={leaving.id} plantId={plant.id} token={leaving} onClose={() => setLeaving(null)} />
        )}
        {made === null ? (
          <ApiTokenForm plantId={plant.id} onMade={setMade} />
        ) : (
          <NewApiTokenNote token={made} onClose={() => setMade(null)} />
        )}
      </div>
    </Sheet>
  );
}

import type { ApiTokenView, MembershipView } from '@app/contracts';
import { formatInstant } from '../../../shared/time/plant-time';
import { Action } from '../../../shared/ui/action';
import { FoldingTable } from '../../../shared/ui/folding-table';

interface ApiTokenTableProps {
  tokens: readonly ApiTokenView[];
  plant: MembershipView['plant'];
  onRevoke: (token: ApiTokenView) => void;
}

export function ApiTokenTable({ tokens, plant, onRevoke }: ApiTokenTableProps) {
  const text = (at: string) => formatInstant(at, plant.timeZone);
  return (
    <FoldingTable
      caption={`Your API tokens at ${plant.name}`}
      items={tokens}
      keyOf={(token) => token.id}
      columns={[
        { name: 'Name', isLead: true, cell: (token) => token.name },
        { name: 'Made', cell: (token) => text(token.createdAt) },
        { name: 'Last used', cell: (token) => (token.lastUsedAt === null ? 'never' : text(token.lastUsedAt)) },
        {
          name: 'In force',
          cell: (token) => (token.revokedAt === null ? 'yes' : `revoked ${text(token.revokedAt)}`),
        },
        {
          name: 'Revoke',
          cell: (token) =>
            token.revokedAt === null ? (
              <Action kind="plain" label={`Revoke ${token.name}`} onPress={() => onRevoke(token)}>
                Revoke
              </Action>
            ) : (
              '–'
            ),
        },
      ]}
    />
  );
}

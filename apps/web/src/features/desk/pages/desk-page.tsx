import '../desk.css';
import { useSession } from '../../../shared/session/session';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useDesk } from '../api/desk';
import { DeskGroupList } from '../components/desk-group-list';
import { DeskMargin } from '../components/desk-margin';
import { EmptyDesk } from '../components/empty-desk';
import { countWords, groupsOf } from '../groups';

/** What waits for me? */
export function DeskPage() {
  const { plant } = useSession();
  const query = useDesk(plant.id);
  const lead =
    query.data === undefined || query.data.items.length === 0
      ? undefined
      : `${countWords(query.data.items.length)} at ${plant.name}.`;
  return (
    <>
      <PageHeading title="Desk" lead={lead} />
      <Sheet margin={<DeskMargin groups={groupsOf(query.data?.items ?? []).map(({ group }) => group)} />}>
        <Loaded
          query={query}
          failure="Your desk could not be loaded."
          skeleton={<Skeleton lines={6} label="Loading what waits for you" />}
          isEmpty={(desk) => desk.items.length === 0}
          empty={<EmptyDesk />}
        >
          {(desk) =>
            groupsOf(desk.items).map(({ group, items }) => <DeskGroupList key={group} group={group} items={items} />)
          }
        </Loaded>
      </Sheet>
    </>
  );
}

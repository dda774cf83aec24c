import type { LineView, PersonView } from '@app/contracts';
import { useEffect, useRef, useState } from 'react';
import { useParams } from 'react-router-dom';
import { useSession } from '../../../shared/session/session';
import { useNow } from '../../../shared/time/use-now';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { usePeople, usePlantLines } from '../api/people';
import { InviteForm } from '../components/invite-form';
import { PersonForm } from '../components/person-form';
import '../people.css';
import { lineWords, roleWords, stateWords } from '../people-words';

/** Who is somebody at this plant, as what? */
export function PeoplePage() {
  const plantId = Number(useParams().plantId);
  const { plant, choosePlant } = useSession();
  useEffect(() => {
    if (plant.id !== plantId) choosePlant(plantId);
  }, [plant.id, plantId, choosePlant]);
  const people = usePeople(plantId);
  const lines = usePlantLines(plantId);
  return (
    <>
      <PageHeading
        title="People"
        lead="Who may do what at this plant. Roles take effect at once; mail about a line goes to those who are assigned to it."
      />
      <Loaded
        query={people}
        failure="The people could not be loaded."
        isEmpty={(items) => items.length === 0}
        empty={<EmptyNote>Nobody has a role here yet. People come by invitation, below.</EmptyNote>}
      >
        {(items) => <PeopleTable plantId={plantId} people={items} lines={lines.data ?? []} />}
      </Loaded>
      {people.data !== undefined && (
        <Sheet
          title="Invite somebody"
          margin={
            <p>
              The mail holds a link to choose a password. It works once, for seven days. Somebody who is at another
              plant already keeps their password.
            </p>
          }
        >
          <InviteForm plantId={plantId} lines={lines.data ?? []} />
        </Sheet>
      )}
    </>
  );
}

interface PeopleTableProps {
  plantId: number;
  people: PersonView[];
  lines: LineView[];
}

function PeopleTable({ plantId, people, lines }: PeopleTableProps) {
  const { me, plant } = useSession();
  const now = useNow();
  const [chosenId, setChosenId] = useState<number | null>(null);
  const chosen = people.find((person) => person.id === chosenId);
  const opener = useRef<HTMLElement | null>(null);
  const open = (person: PersonView) => {
    opener.current = document.activeElement as HTMLElement | null;
    setChosenId(person.id);
  };
  const close = () => {
    setChosenId(null);
    opener.current?.focus();
  };
  return (
    <>
      <Sheet isFlush>
        <FoldingTable
          caption="People of this plant"
          items={people}
          keyOf={(person) => person.id}
          columns={[
            { name: 'Name', isLead: true, cell: (person) => person.name },
            { name: 'E-mail', cell: (person) => person.email },
            { name: 'Roles', cell: roleWords },
            { name: 'Lines', cell: (person) => lineWords(person, lines) },
            { name: 'State', cell: (person) => stateWords(person, plant.timeZone, now) },
            {
              name: 'Change',
              cell: (person) => (
                <Action kind="plain" label={`Change ${person.name}`} onPress={() => open(person)}>
                  Change
                </Action>
              ),
            },
          ]}
        />
      </Sheet>
      {chosen !== undefined && (
        <Sheet
          title={chosen.name}
          margin={
            <p>
              Disabling ends every session and every link at once, at all plants. It is refused for somebody who also
              works at a plant that you do not administer.
            </p>
          }
        >
          <PersonForm
            key={`${chosen.id} ${chosen.roles.join()} ${chosen.lineIds.join()}`}
            plantId={plantId}
            person={chosen}
            lines={lines}
            isYourself={chosen.id === me.id}
            onClose={close}
          />
        </Sheet>
      )}
    </>
  );
}

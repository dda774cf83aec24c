import type { LineSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { useLines } from '../api/set-up';
import { useSend, type Send } from '../api/use-send';
import { InlineForm, type FieldSpec } from './inline-form';
import { retiring } from './retiring';
import { RowTable, type RowAction } from './row-table';
import { ShiftSheet } from './shift-sheet';

const COLUMNS: FoldingColumn<LineSetUpView>[] = [
  { name: 'Line', isLead: true, cell: (line) => (line.isRetired ? `${line.name}, retired` : line.name) },
  { name: 'Channels', isNumber: true, cell: (line) => line.channelCount },
];
const FIELDS: FieldSpec<{ name: string }>[] = [
  { name: 'name', label: 'Name', hint: 'As the plant calls it.', missing: 'Give the line’s name.' },
];

export function LineSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const send = useSend(plantId);
  const query = useLines(plantId);
  const isMine = can('set_up_plant');
  return (
    <>
      <Sheet title="Lines" isFlush margin={<p>A line with channels in use is not retired: retire those first.</p>}>
        <Loaded query={query} failure="The lines could not be loaded.">
          {(lines) => (
            <RowTable
              caption="Lines"
              columns={COLUMNS}
              items={lines}
              keyOf={(line) => line.id}
              isSoft={(line) => line.isRetired}
              empty="No line yet. Lots, workbooks and channels belong to a line; an administrator adds it here."
              actionsOf={isMine ? (line) => actionsOf(line, send) : undefined}
              add={
                isMine
                  ? { words: 'Add a line', form: (onDone) => <NewLine plantId={plantId} onDone={onDone} /> }
                  : undefined
              }
            />
          )}
        </Loaded>
      </Sheet>
      <ShiftSheet plantId={plantId} />
    </>
  );
}

function NewLine({ plantId, onDone }: { plantId: number; onDone: () => void }) {
  const send = useSend(plantId);
  const add = async ({ name }: { name: string }) => {
    await send('POST', `/plants/${plantId}/set-up/lines`, { name: name.trim() });
    onDone();
  };
  return <InlineForm fields={FIELDS} values={{ name: '' }} sends="Add the line" send={add} onLeave={onDone} />;
}

function actionsOf(line: LineSetUpView, send: Send): RowAction[] {
  const path = `/lines/${line.id}`;
  const rename: RowAction = {
    words: 'Rename',
    label: `Rename ${line.name}`,
    panel: (onDone) => (
      <InlineForm
        fields={FIELDS}
        values={{ name: line.name }}
        sends="Rename"
        onLeave={onDone}
        send={async ({ name }) => {
          if (name.trim() !== line.name) await send('PATCH', path, { name: name.trim() });
          onDone();
        }}
      />
    ),
  };
  const consequence = `No more workbooks go to ${line.name}. Its lots and their records stay.`;
  const channels = line.channelCount === 1 ? 'a channel' : `${line.channelCount} channels`;
  const hindrance =
    line.channelCount > 0
      ? `${line.name} has ${channels} in use: retire ${line.channelCount === 1 ? 'it' : 'those'} first.`
      : undefined;
  return [rename, retiring(send, { name: line.name, isRetired: line.isRetired, path, consequence, hindrance })];
}

import { decimalsOf, formatNumber, type CharacteristicSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { useCharacteristics } from '../api/set-up';
import { useSend, type Send } from '../api/use-send';
import { changedFields } from '../changed';
import { numberText, readNumber } from '../typed-values';
import { InlineForm, type FieldSpec } from './inline-form';
import { retiring } from './retiring';
import { RowTable, type RowAction } from './row-table';

type Typed = { name: string; unit: string; resolution: string };

const fieldsOf = (mayChangeUnit: boolean): FieldSpec<Typed>[] => [
  { name: 'name', label: 'Name', hint: 'What is measured.', missing: 'Give the characteristic’s name.' },
  {
    name: 'unit',
    label: 'Unit',
    hint: mayChangeUnit ? 'Such as g/m²; empty for pH.' : 'There are values in it: it stays.',
    size: 'short',
    isFixed: !mayChangeUnit,
  },
  {
    name: 'resolution',
    label: 'Resolution',
    hint: 'Smallest step shown, in the unit.',
    kind: 'number',
    missing: 'Give the smallest step, such as 0.01.',
  },
];

const bodyOf = (typed: Typed) => ({
  name: typed.name.trim(),
  unit: typed.unit.trim(),
  resolution: readNumber(typed.resolution) ?? Number.NaN,
});

const COLUMNS: FoldingColumn<CharacteristicSetUpView>[] = [
  { name: 'Characteristic', isLead: true, cell: ({ name, isRetired }) => (isRetired ? `${name}, retired` : name) },
  { name: 'Unit', cell: ({ unit }) => (unit === '' ? 'none' : unit) },
  {
    name: 'Resolution',
    isNumber: true,
    cell: ({ resolution, unit }) => `${formatNumber(resolution, decimalsOf(resolution))}${unit && `\u202f${unit}`}`,
  },
];

export function CharacteristicSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const send = useSend(plantId);
  const query = useCharacteristics(plantId);
  const isMine = can('set_up_plant');
  const add = async (typed: Typed, onDone: () => void) => {
    await send('POST', `/plants/${plantId}/set-up/characteristics`, bodyOf(typed));
    onDone();
  };
  return (
    <Sheet title="Characteristics" isFlush margin={<p>Values are shown with the decimals of the resolution.</p>}>
      <Loaded query={query} failure="The characteristics could not be loaded.">
        {(characteristics) => (
          <RowTable
            caption="Characteristics"
            columns={COLUMNS}
            items={characteristics}
            keyOf={(characteristic) => characteristic.id}
            isSoft={(characteristic) => characteristic.isRetired}
            empty="No characteristic yet. Coat weight in g/m² would be one; an administrator adds them here."
            actionsOf={isMine ? (characteristic) => actionsOf(characteristic, send) : undefined}
            add={
              isMine
                ? {
                    words: 'Add a characteristic',
                    form: (onDone) => (
                      <InlineForm
                        fields={fieldsOf(true)}
                        values={{ name: '', unit: '', resolution: '' }}
                        sends="Add the characteristic"
                        send={(typed) => add(typed, onDone)}
                        onLeave={onDone}
                      />
                    ),
                  }
                : undefined
            }
          />
        )}
      </Loaded>
    </Sheet>
  );
}

function actionsOf(characteristic: CharacteristicSetUpView, send: Send): RowAction[] {
  const { id, name, unit, resolution, isRetired, mayChangeUnit } = characteristic;
  const path = `/characteristics/${id}`;
  const before: Typed = { name, unit, resolution: numberText(resolution) };
  const change: RowAction = {
    words: 'Change',
    label: `Change ${name}`,
    panel: (onDone) => (
      <InlineForm
        fields={fieldsOf(mayChangeUnit)}
        values={before}
        sends={`Change ${name}`}
        onLeave={onDone}
        send={async (typed) => {
          const changes = changedFields(bodyOf(before), bodyOf(typed));
          if (changes !== null) await send('PATCH', path, changes);
          onDone();
        }}
      />
    ),
  };
  const consequence = `No new channel or specification is made with ${name}. What was measured stays.`;
  return [change, retiring(send, { name, isRetired, path, consequence })];
}

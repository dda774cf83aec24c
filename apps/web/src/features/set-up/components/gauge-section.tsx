import type { GaugeSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useGauges } from '../api/set-up';
import { useSend, type Send } from '../api/use-send';
import { changedFields } from '../changed';
import { listed } from '../readiness';
import { InlineForm, type FieldSpec } from './inline-form';
import { retiring } from './retiring';
import { RowTable, type RowAction } from './row-table';

type Typed = { assetNumber: string; kind: string };

const FIELDS: FieldSpec<Typed>[] = [
  { name: 'assetNumber', label: 'Asset number', hint: 'As on its plate.', missing: 'Give the asset number.' },
  { name: 'kind', label: 'Kind', hint: 'Such as beta gauge, load cell.', missing: 'Say what kind of gauge it is.' },
];

const bodyOf = (typed: Typed) => ({ assetNumber: typed.assetNumber.trim(), kind: typed.kind.trim() });

const COLUMNS: FoldingColumn<GaugeSetUpView>[] = [
  {
    name: 'Asset number',
    isLead: true,
    cell: ({ assetNumber, isRetired }) => (isRetired ? `${assetNumber}, retired` : assetNumber),
  },
  { name: 'Kind', cell: ({ kind }) => kind },
  {
    name: 'Serves',
    cell: ({ serves }) =>
      serves.length === 0
        ? 'no channel'
        : serves.map(({ channelId, channelName, lineName, since }) => (
            <div key={channelId}>
              {channelName}, {lineName}, since <When at={since} form="date" />
            </div>
          )),
  },
];

export function GaugeSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const send = useSend(plantId);
  const query = useGauges(plantId);
  const isMine = can('set_up_plant');
  const add = async (typed: Typed, onDone: () => void) => {
    await send('POST', `/plants/${plantId}/set-up/gauges`, bodyOf(typed));
    onDone();
  };
  return (
    <Sheet title="Gauges" isFlush margin={<p>A gauge that serves a channel is not retired: change its gauge first.</p>}>
      <Loaded query={query} failure="The gauges could not be loaded.">
        {(gauges) => (
          <RowTable
            caption="Gauges"
            columns={COLUMNS}
            items={gauges}
            keyOf={(gauge) => gauge.id}
            isSoft={(gauge) => gauge.isRetired}
            empty="No gauge yet. A channel needs one to measure with; an administrator adds them here."
            actionsOf={isMine ? (gauge) => actionsOf(gauge, send) : undefined}
            add={
              isMine
                ? {
                    words: 'Add a gauge',
                    form: (onDone) => (
                      <InlineForm
                        fields={FIELDS}
                        values={{ assetNumber: '', kind: '' }}
                        sends="Add the gauge"
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

function actionsOf({ id, assetNumber, kind, isRetired, serves }: GaugeSetUpView, send: Send): RowAction[] {
  const path = `/gauges/${id}`;
  const before: Typed = { assetNumber, kind };
  const change: RowAction = {
    words: 'Change',
    label: `Change ${assetNumber}`,
    panel: (onDone) => (
      <InlineForm
        fields={FIELDS}
        values={before}
        sends={`Change ${assetNumber}`}
        onLeave={onDone}
        send={async (typed) => {
          const changes = changedFields(bodyOf(before), bodyOf(typed));
          if (changes !== null) await send('PATCH', path, changes);
          onDone();
        }}
      />
    ),
  };
  const consequence = `${assetNumber} serves no channel any more. What it measured stays.`;
  const places = serves.map(({ channelName, lineName }) => `${channelName} on ${lineName}`);
  const hindrance =
    places.length > 0 ? `${assetNumber} serves ${listed(places)}: put another gauge there first.` : undefined;
  return [change, retiring(send, { name: assetNumber, isRetired, path, consequence, hindrance })];
}

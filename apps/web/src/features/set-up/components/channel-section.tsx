import type { ChannelSetUpView, GaugeServiceView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useChannelSetUps, useCharacteristics, useGauges, useLines } from '../api/set-up';
import { useSend } from '../api/use-send';
import { changingGauge, namingChannel, NewChannelForm } from './channel-forms';
import { retiring } from './retiring';
import { RowTable, type RowAction } from './row-table';

const COLUMNS: FoldingColumn<ChannelSetUpView>[] = [
  { name: 'Channel', isLead: true, cell: ({ name, isRetired }) => (isRetired ? `${name}, retired` : name) },
  { name: 'Line', cell: ({ line }) => <span className="number">{line.name}</span> },
  { name: 'Measures', cell: ({ characteristic }) => characteristic.name },
  { name: 'Position', cell: ({ position }) => position },
  { name: 'Gauge', cell: ({ gauges }) => <Gauges gauges={gauges} /> },
];

function Gauges({ gauges }: { gauges: readonly GaugeServiceView[] }) {
  if (gauges.length === 0) return 'none';
  return gauges.map(({ gaugeId, assetNumber, since, until }) => (
    <div key={`${gaugeId} ${since}`} className={until === null ? 'channels__gauge' : 'channels__gauge soft'}>
      {assetNumber}, since <When at={since} form="date" />
      {until !== null && (
        <>
          {' '}
          until <When at={until} form="date" />
        </>
      )}
    </div>
  ));
}

/** Which gauge measures which characteristic where, and since when. */
export function ChannelSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const send = useSend(plantId);
  const query = useChannelSetUps(plantId);
  const inUse = <T extends { isRetired: boolean }>(things: readonly T[] | undefined) =>
    (things ?? []).filter(({ isRetired }) => !isRetired);
  const lines = inUse(useLines(plantId).data);
  const characteristics = inUse(useCharacteristics(plantId).data);
  const gauges = inUse(useGauges(plantId).data);
  const isMine = can('set_up_plant');
  const isPossible = lines.length > 0 && characteristics.length > 0 && gauges.length > 0;
  const actionsOf = (channel: ChannelSetUpView): RowAction[] => {
    const { id, name, line, isRetired } = channel;
    const ending = retiring(send, {
      name: `${name} on ${line.name}`,
      isRetired,
      path: `/channels/${id}`,
      consequence: `No more readings of ${name} on ${line.name} are taken in. Its record, plans and lots stay.`,
    });
    return isRetired ? [ending] : [namingChannel(send, channel), changingGauge(plantId, channel, gauges), ending];
  };
  return (
    <Sheet
      title="Channels"
      isFlush
      margin={
        <>
          <p>A channel is one gauge measuring one characteristic on one line: it has a baseline and a plan.</p>
          <p>A change of gauge is a break: the baseline starts afresh there.</p>
        </>
      }
    >
      <Loaded query={query} failure="The channels could not be loaded.">
        {(channels) => (
          <RowTable
            caption="Channels"
            columns={COLUMNS}
            items={channels}
            keyOf={({ id }) => id}
            isSoft={({ isRetired }) => isRetired}
            empty={
              isPossible
                ? 'No channel yet. The columns of a workbook are read into channels; an administrator adds them here.'
                : 'No channel yet. It joins a line, a characteristic and a gauge: those come first.'
            }
            actionsOf={isMine ? actionsOf : undefined}
            add={
              isMine && isPossible
                ? {
                    words: 'Add a channel',
                    form: (onDone) => (
                      <NewChannelForm
                        plantId={plantId}
                        lines={lines}
                        characteristics={characteristics}
                        gauges={gauges}
                        onDone={onDone}
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

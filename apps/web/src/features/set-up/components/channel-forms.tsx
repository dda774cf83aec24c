import type {
  ChannelGaugeBody,
  ChannelSetUpView,
  CharacteristicSetUpView,
  GaugeSetUpView,
  LineSetUpView,
  NewChannelBody,
} from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { formatInstant, plantDay } from '../../../shared/time/plant-time';
import { useNow } from '../../../shared/time/use-now';
import { useSend, type Send } from '../api/use-send';
import { changedFields } from '../changed';
import { instantOf } from '../typed-values';
import { InlineForm, type FieldSpec } from './inline-form';
import type { RowAction } from './row-table';

type Naming = { name: string; position: string };
const NAMING: FieldSpec<Naming>[] = [
  { name: 'name', label: 'Name', hint: 'As the workbook’s column is called.', missing: 'Give the channel’s name.' },
  {
    name: 'position',
    label: 'Position',
    hint: 'Where the gauge stands.',
    size: 'short',
    missing: 'Say where, such as exit.',
  },
];

type Since = { gaugeId: string; day: string; time: string };
const sinceFields = (gauges: readonly GaugeSetUpView[], timeZone: string, dayHint: string): FieldSpec<Since>[] => [
  {
    name: 'gaugeId',
    label: 'Gauge',
    kind: 'choice',
    options: gauges.map(({ id, assetNumber, kind }) => ({ value: id, label: `${assetNumber}, ${kind}` })),
  },
  {
    name: 'day',
    label: 'Serves since, year-month-day',
    hint: dayHint,
    kind: 'day',
    pointer: '/since',
    missing: 'Say since which day.',
  },
  { name: 'time', label: `Time, 24 h, ${timeZone}`, kind: 'time', missing: 'Say since what time.' },
];

interface NewChannelFormProps {
  plantId: number;
  lines: readonly LineSetUpView[];
  characteristics: readonly CharacteristicSetUpView[];
  gauges: readonly GaugeSetUpView[];
  onDone: () => void;
}

type NewChannel = Naming & Since & { lineId: string; characteristicId: string };

export function NewChannelForm({ plantId, lines, characteristics, gauges, onDone }: NewChannelFormProps) {
  const { plant } = useSession();
  const send = useSend(plantId);
  const now = useNow();
  const optionsOf = (things: readonly { id: number; name: string }[]) =>
    things.map(({ id, name }) => ({ value: id, label: name }));
  const fields: FieldSpec<NewChannel>[] = [
    { name: 'lineId', label: 'Line', kind: 'choice', options: optionsOf(lines) },
    { name: 'characteristicId', label: 'Characteristic', kind: 'choice', options: optionsOf(characteristics) },
    ...(NAMING as FieldSpec<NewChannel>[]),
    ...(sinceFields(gauges, plant.timeZone, 'Before the first readings.') as FieldSpec<NewChannel>[]),
  ];
  const values: NewChannel = {
    lineId: String(lines[0].id),
    characteristicId: String(characteristics[0].id),
    name: '',
    position: '',
    gaugeId: String(gauges[0].id),
    day: `${plantDay(now, plant.timeZone).slice(0, 4)}-01-01`,
    time: '00:00',
  };
  const add = async (typed: NewChannel) => {
    const body: NewChannelBody = {
      lineId: Number(typed.lineId),
      characteristicId: Number(typed.characteristicId),
      position: typed.position.trim(),
      name: typed.name.trim(),
      gaugeId: Number(typed.gaugeId),
      since: instantOf(typed.day, typed.time, plant.timeZone),
    };
    await send('POST', `/plants/${plantId}/set-up/channels`, body);
    onDone();
  };
  return <InlineForm fields={fields} values={values} sends="Add the channel" send={add} onLeave={onDone} />;
}

export function namingChannel(send: Send, { id, name, position, line }: ChannelSetUpView): RowAction {
  const before: Naming = { name, position };
  return {
    words: 'Change',
    label: `Change ${name} on ${line.name}`,
    panel: (onDone) => (
      <InlineForm
        fields={NAMING}
        values={before}
        sends={`Change ${name}`}
        onLeave={onDone}
        send={async (typed) => {
          const changes = changedFields(before, { name: typed.name.trim(), position: typed.position.trim() });
          if (changes !== null) await send('PATCH', `/channels/${id}`, changes);
          onDone();
        }}
      />
    ),
  };
}

export function changingGauge(
  plantId: number,
  channel: ChannelSetUpView,
  gauges: readonly GaugeSetUpView[],
): RowAction {
  return {
    words: 'Change its gauge',
    label: `Change the gauge of ${channel.name} on ${channel.line.name}`,
    panel: (onDone) => <GaugeForm plantId={plantId} channel={channel} gauges={gauges} onDone={onDone} />,
  };
}

interface GaugeFormProps {
  plantId: number;
  channel: ChannelSetUpView;
  gauges: readonly GaugeSetUpView[];
  onDone: () => void;
}

function GaugeForm({ plantId, channel, gauges, onDone }: GaugeFormProps) {
  const { plant } = useSession();
  const send = useSend(plantId);
  const now = useNow();
  const current = channel.gauges.find(({ until }) => until === null);
  const others = gauges.filter(({ id }) => id !== current?.gaugeId);
  if (others.length === 0) {
    return <p className="inline-form__note">There is no other gauge to put here. Add it under Gauges first.</p>;
  }
  const values: Since = {
    gaugeId: String(others[0].id),
    day: plantDay(now, plant.timeZone),
    time: formatInstant(now, plant.timeZone, 'time'),
  };
  const change = async (typed: Since) => {
    const body: ChannelGaugeBody = {
      gaugeId: Number(typed.gaugeId),
      since: instantOf(typed.day, typed.time, plant.timeZone),
    };
    await send('POST', `/channels/${channel.id}/gauges`, body);
    onDone();
  };
  const ends = current === undefined ? '' : `${current.assetNumber} ends there. `;
  const restarts = channel.hasReadings
    ? 'The baseline starts afresh at that instant, and the lots around it are judged again.'
    : 'There are no readings yet, so nothing is judged again.';
  return (
    <InlineForm
      fields={sinceFields(others, plant.timeZone, 'When it was put in.')}
      values={values}
      sends={`Change the gauge of ${channel.name}`}
      note={`${ends}${restarts}`}
      send={change}
      onLeave={onDone}
    />
  );
}

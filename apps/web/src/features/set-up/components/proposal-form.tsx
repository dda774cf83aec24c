import type {
  Characteristic,
  ProductSetUpView,
  SpecificationProposalBody,
  SpecificationVersionView,
} from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { formatInstant, plantDay } from '../../../shared/time/plant-time';
import { useNow } from '../../../shared/time/use-now';
import { useSend } from '../api/use-send';
import { instantOf, numberText, readNumber } from '../typed-values';
import { InlineForm, type FieldSpec } from './inline-form';

interface ProposalFormProps {
  plantId: number;
  product: ProductSetUpView;
  /** Those that may be chosen; one: it is given. */
  characteristics: readonly (Characteristic & { id: number })[];
  /** The newest version, whose values the form begins with. */
  before: SpecificationVersionView | null;
  onDone: () => void;
}

type Typed = {
  characteristicId: string;
  nominal: string;
  lower: string;
  upper: string;
  day: string;
  time: string;
  reason: string;
  appliesToIndividuals: boolean;
};

const LIMIT_HINT = 'One of the two may be empty.';

function fieldsOf({ characteristics }: ProposalFormProps, timeZone: string): FieldSpec<Typed>[] {
  const [{ unit }] = characteristics;
  const given = characteristics.length === 1;
  const inUnit = given && unit !== '' ? `, ${unit}` : '';
  const choice: FieldSpec<Typed> = {
    name: 'characteristicId',
    label: 'Characteristic',
    kind: 'choice',
    options: characteristics.map(({ id, name, unit: its }) => ({
      value: id,
      label: its === '' ? name : `${name}, ${its}`,
    })),
  };
  return [
    ...(given ? [] : [choice]),
    { name: 'nominal', label: `Nominal value${inUnit}`, kind: 'number', missing: 'Give the nominal value.' },
    { name: 'lower', label: `Lower specification limit${inUnit}`, hint: LIMIT_HINT, kind: 'number' },
    { name: 'upper', label: `Upper specification limit${inUnit}`, hint: LIMIT_HINT, kind: 'number' },
    {
      name: 'day',
      isFirst: true,
      label: 'In force from, year-month-day',
      kind: 'day',
      pointer: '/validFrom',
      missing: 'Say from which day on.',
    },
    { name: 'time', label: `Time, 24 h, ${timeZone}`, kind: 'time', missing: 'Say from what time on.' },
    { name: 'reason', label: 'Reason', size: 'long', missing: 'Say why, and where the figures come from.' },
    {
      name: 'appliesToIndividuals',
      label: 'Every reading is compared with the specification limits, not only the lot mean.',
      kind: 'check',
    },
  ];
}

/** Proposes a version of a specification; nothing changes until another person approves it. */
export function ProposalForm(props: ProposalFormProps) {
  const { plantId, product, characteristics, before, onDone } = props;
  const { plant } = useSession();
  const send = useSend(plantId);
  const now = useNow();
  // A first version also covers what was made before today; a later one begins with the next full hour.
  const start = before === null ? now - 60 * 86_400_000 : Math.ceil(now / 3_600_000) * 3_600_000;
  const values: Typed = {
    characteristicId: String(characteristics[0].id),
    nominal: numberText(before?.nominal ?? null),
    lower: numberText(before?.lower ?? null),
    upper: numberText(before?.upper ?? null),
    day: plantDay(start, plant.timeZone),
    time: before === null ? '00:00' : formatInstant(start, plant.timeZone, 'time'),
    reason: '',
    appliesToIndividuals: before?.appliesToIndividuals ?? true,
  };
  const propose = async (typed: Typed) => {
    const body: SpecificationProposalBody = {
      productId: product.id,
      characteristicId: Number(typed.characteristicId),
      nominal: readNumber(typed.nominal) ?? Number.NaN,
      lower: readNumber(typed.lower),
      upper: readNumber(typed.upper),
      appliesToIndividuals: typed.appliesToIndividuals,
      validFrom: instantOf(typed.day, typed.time, plant.timeZone),
      reason: typed.reason.trim(),
    };
    await send('POST', `/plants/${plantId}/set-up/specification-proposals`, body);
    onDone();
  };
  return (
    <InlineForm
      fields={fieldsOf(props, plant.timeZone)}
      values={values}
      sends="Propose this specification"
      send={propose}
      onLeave={onDone}
      note="Nothing changes until a quality manager who did not propose it approves it."
    />
  );
}

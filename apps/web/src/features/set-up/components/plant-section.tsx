import type { PlantSetUpBody, PlantSetUpView } from '@app/contracts';
import { useAuth } from '../../../shared/session/auth';
import { useSession } from '../../../shared/session/session';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { useToast } from '../../../shared/ui/toast';
import { usePlantSetUp } from '../api/set-up';
import { useSend } from '../api/use-send';
import { changedFields } from '../changed';
import { percentText, readNumber, shareOf } from '../typed-values';
import { InlineForm, type FieldSpec } from './inline-form';
import { timeZones } from '../time-zones';

/** The plant itself: its name, its clocks, and what holds for all of its lines. */
export function PlantSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const query = usePlantSetUp(plantId);
  return (
    <Sheet
      title="The plant"
      margin={
        <>
          <p>Workbooks are read, shifts cut and times shown in the plant’s zone.</p>
          <p>A change of an allowance reaches plans that are proposed from then on; plans in force stay as approved.</p>
        </>
      }
    >
      <Loaded query={query} failure="The plant could not be loaded.">
        {(plant) => (can('set_up_plant') ? <PlantForm plant={plant} /> : <PlantFigures plant={plant} />)}
      </Loaded>
    </Sheet>
  );
}

const typedOf = (plant: PlantSetUpView) => ({
  name: plant.name,
  timeZone: plant.timeZone,
  currency: plant.currency ?? '',
  reminderManagerHours: String(plant.reminderManagerHours),
  reminderDirectorHours: String(plant.reminderDirectorHours),
  allowanceNoticeShare: percentText(plant.allowanceNoticeShare),
  allowanceCapShare: percentText(plant.allowanceCapShare),
  engineerMayRelease: plant.engineerMayRelease,
});
type Typed = ReturnType<typeof typedOf>;

const bodyOf = (typed: Typed): PlantSetUpBody => ({
  name: typed.name.trim(),
  timeZone: typed.timeZone.trim(),
  currency: typed.currency.trim() === '' ? null : typed.currency.trim(),
  reminderManagerHours: readNumber(typed.reminderManagerHours) ?? undefined,
  reminderDirectorHours: readNumber(typed.reminderDirectorHours) ?? undefined,
  allowanceNoticeShare: shareOf(typed.allowanceNoticeShare),
  allowanceCapShare: shareOf(typed.allowanceCapShare),
  engineerMayRelease: typed.engineerMayRelease,
});

const fieldsOf = (plant: PlantSetUpView): FieldSpec<Typed>[] => [
  { name: 'name', label: 'Name', missing: 'Give the plant’s name.' },
  {
    name: 'timeZone',
    label: 'Time zone',
    hint: plant.mayChangeTimeZone ? 'Such as Europe/London.' : 'Workbooks were read in it: it stays.',
    isFixed: !plant.mayChangeTimeZone,
    offers: timeZones(),
    missing: 'Give the plant’s time zone.',
  },
  { name: 'currency', label: 'Currency', hint: 'Such as EUR; may be empty.', size: 'short' },
  {
    name: 'reminderManagerHours',
    isFirst: true,
    label: 'Remind managers after, h',
    hint: 'Age of an open hold.',
    kind: 'number',
    missing: 'Say after how many hours.',
  },
  {
    name: 'reminderDirectorHours',
    label: 'Remind directors after, h',
    hint: 'Not sooner than managers.',
    kind: 'number',
    missing: 'Say after how many hours.',
  },
  {
    name: 'allowanceNoticeShare',
    isFirst: true,
    label: 'Allowance, notice, % of tolerance',
    hint: 'Movement that is told.',
    kind: 'number',
    missing: 'Give a share of the tolerance.',
  },
  {
    name: 'allowanceCapShare',
    label: 'Allowance, cap, % of tolerance',
    hint: 'Beyond it lots are not scored.',
    kind: 'number',
    missing: 'Give a share of the tolerance.',
  },
  {
    name: 'engineerMayRelease',
    label: 'Quality engineers may release lots that are held for control limits alone.',
    kind: 'check',
  },
];

function PlantForm({ plant }: { plant: PlantSetUpView }) {
  const send = useSend(plant.id);
  const { readMeAgain } = useAuth();
  const toast = useToast();
  const values = typedOf(plant);
  const save = async (typed: Typed) => {
    const changes = changedFields(bodyOf(values), bodyOf(typed));
    if (changes === null) return toast.done('Nothing was changed.');
    await send('PATCH', `/plants/${plant.id}/set-up`, changes);
    if (changes.name !== undefined || changes.timeZone !== undefined) await readMeAgain();
    toast.done(`Saved for ${typed.name.trim()}.`);
  };
  return <InlineForm fields={fieldsOf(plant)} values={values} sends="Save the plant" send={save} />;
}

function PlantFigures({ plant }: { plant: PlantSetUpView }) {
  const facts: [string, string][] = [
    ['Name', plant.name],
    ['Time zone', plant.timeZone],
    ['Currency', plant.currency ?? 'none stated'],
    ['Managers are reminded of an open hold after', `${plant.reminderManagerHours}\u202fh`],
    ['Directors after', `${plant.reminderDirectorHours}\u202fh`],
    ['Allowance, notice', `${percentText(plant.allowanceNoticeShare)}\u202f% of the tolerance`],
    ['Allowance, cap', `${percentText(plant.allowanceCapShare)}\u202f% of the tolerance`],
    ['Lots held for control limits alone are released by', plant.engineerMayRelease ? 'engineers too' : 'managers'],
  ];
  return (
    <dl className="set-up-facts">
      {facts.map(([name, value]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  );
}

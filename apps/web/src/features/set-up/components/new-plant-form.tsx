import type { NewPlantBody, PlantSetUpView } from '@app/contracts';
import { apiSend } from '../../../shared/api/client';
import { ownTimeZone, timeZones } from '../time-zones';
import { InlineForm, type FieldSpec } from './inline-form';

type Typed = { name: string; timeZone: string; currency: string };

const fields = (): FieldSpec<Typed>[] => [
  { name: 'name', label: 'Name', hint: 'As people call the site.', missing: 'Give the plant’s name.' },
  {
    name: 'timeZone',
    label: 'Time zone',
    hint: 'Such as Europe/London.',
    offers: timeZones(),
    missing: 'Give the plant’s time zone.',
  },
  { name: 'currency', label: 'Currency', hint: 'Such as EUR; may be empty.', size: 'short' },
];

/** The first words of a plant; whoever says them becomes its administrator. */
export function NewPlantForm({ onMade }: { onMade: (plant: PlantSetUpView) => Promise<void> }) {
  const make = async (typed: Typed) => {
    const body: NewPlantBody = {
      name: typed.name.trim(),
      timeZone: typed.timeZone.trim(),
      currency: typed.currency.trim() === '' ? null : typed.currency.trim(),
    };
    await onMade(await apiSend<PlantSetUpView>('POST', '/plants', body));
  };
  return (
    <InlineForm
      fields={fields()}
      values={{ name: '', timeZone: ownTimeZone(), currency: '' }}
      sends="Make the plant"
      send={make}
    />
  );
}

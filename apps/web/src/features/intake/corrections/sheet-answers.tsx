import type { LayoutAnswers } from '@app/contracts';
import { useId } from 'react';
import { useSession } from '../../../shared/session/session';
import { withLayout } from './corrections';
import type { Draft } from './use-draft';

/** How dates, numbers, times and missing values of a sheet are written. */
export function SheetAnswers({ sheet, layout, draft }: { sheet: string; layout: LayoutAnswers; draft: Draft }) {
  const { plant } = useSession();
  const zoneId = useId();
  const say = (change: Partial<LayoutAnswers>) => draft.change(withLayout(draft.answers, sheet, change));
  return (
    <div className="sheet-answers">
      <label>
        <span>Dates written as text</span>
        <select
          value={layout.dateOrder ?? ''}
          disabled={draft.isBusy}
          onChange={({ currentTarget: { value } }) => say({ dateOrder: orNothing<'day-month' | 'month-day'>(value) })}
        >
          <option value="">as recognised</option>
          <option value="day-month">day before month</option>
          <option value="month-day">month before day</option>
        </select>
      </label>
      <label>
        <span>Decimal sign</span>
        <select
          value={layout.decimalSign ?? ''}
          disabled={draft.isBusy}
          onChange={({ currentTarget: { value } }) => say({ decimalSign: orNothing<'.' | ','>(value) })}
        >
          <option value="">as recognised</option>
          <option value=",">comma</option>
          <option value=".">point</option>
        </select>
      </label>
      <label>
        <span>Zone of the times</span>
        <input
          key={layout.timeZone ?? ''}
          list={zoneId}
          placeholder={plant.timeZone}
          defaultValue={layout.timeZone ?? ''}
          disabled={draft.isBusy}
          onBlur={({ currentTarget: { value } }) => {
            if (value.trim() !== (layout.timeZone ?? '')) say({ timeZone: orNothing(value.trim()) });
          }}
        />
        <datalist id={zoneId}>
          {[plant.timeZone, 'UTC'].map((zone) => (
            <option key={zone} value={zone} />
          ))}
        </datalist>
      </label>
      <label>
        <span>A missing value is written</span>
        <input
          key={layout.missing?.join(' ') ?? ''}
          placeholder="-- 9999"
          defaultValue={layout.missing?.join(' ') ?? ''}
          disabled={draft.isBusy}
          onBlur={({ currentTarget: { value } }) => {
            const missing = value.split(/\s+/).filter((one) => one !== '');
            if (missing.join(' ') !== (layout.missing ?? []).join(' '))
              say({ missing: missing.length > 0 ? missing : undefined });
          }}
        />
      </label>
      <label className="sheet-answers__check">
        <input
          type="checkbox"
          checked={layout.isShiftDate ?? false}
          disabled={draft.isBusy}
          onChange={({ currentTarget: { checked } }) => say({ isShiftDate: checked || undefined })}
        />
        <span>The date is the day on which the shift began</span>
      </label>
    </div>
  );
}

const orNothing = <T extends string>(value: string): T | undefined => (value === '' ? undefined : (value as T));

import type { HoldView } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { When } from '../../../shared/ui/when';
import { useSetAside } from '../api/use-hold';

/** The line lead's word that the lot physically stands apart. */
export function SetAside({ hold }: { hold: HoldView }) {
  const { setAside, lot } = hold;
  if (setAside !== null) {
    return (
      <p role="status">
        {setAside.by} confirmed on <When at={setAside.at} form="short" /> that the lot stands apart
        {setAside.place === null ? '.' : `: ${setAside.place}.`}
      </p>
    );
  }
  if (hold.state === 'withdrawn') return <p>Nobody confirmed that the lot stood apart before the hold ended.</p>;
  if (hold.state === 'decided') return <p>Nobody confirmed that the lot stood apart before it was decided.</p>;
  if (!hold.maySetAside) {
    return <p>Nobody has confirmed yet that lot {lot.number} stands apart. The line lead or an engineer does.</p>;
  }
  return <SetAsideForm hold={hold} />;
}

function SetAsideForm({ hold }: { hold: HoldView }) {
  const setAside = useSetAside(hold.id);
  const form = useForm({ defaultValues: { place: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ place }) => {
    try {
      await setAside.mutateAsync(place.trim() === '' ? {} : { place: place.trim() });
    } catch (error) {
      showProblem(form, ['place'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <p>The hold itself is only a notice: somebody has to see that the lot cannot move on.</p>
      <Field label="Where it stands" hint="May be left empty." error={errors.place?.message}>
        {(control) => <input {...control} className="input" autoComplete="off" {...form.register('place')} />}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind="quiet" isBusy={isSubmitting}>
          Confirm that lot {hold.lot.number} is set aside
        </Action>
      </div>
    </form>
  );
}

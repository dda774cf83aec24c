import type { NewApiToken } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useMakeApiToken } from '../api/api-tokens';

export function ApiTokenForm({ plantId, onMade }: { plantId: number; onMade: (token: NewApiToken) => void }) {
  const make = useMakeApiToken(plantId);
  const form = useForm({ defaultValues: { name: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async (values) => {
    try {
      const made = await make.mutateAsync(values);
      make.reset();
      onMade(made);
    } catch (error) {
      showProblem(form, ['name'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <Field
        label="Where the new token is used"
        hint="So that you can tell it from others, such as: line computer of Coater 2."
        error={errors.name?.message}
      >
        {(control) => (
          <input
            {...control}
            className="input"
            autoComplete="off"
            maxLength={120}
            {...form.register('name', { required: 'Say where the token is used, so that it can be told from others.' })}
          />
        )}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind="quiet" isBusy={isSubmitting}>
          Make an API token
        </Action>
      </div>
    </form>
  );
}

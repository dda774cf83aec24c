import { SIGNATURE_MEANINGS, type DecisionRequest, type Disposition, type HoldView } from '@app/contracts';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { asProblem } from '../../../shared/api/client';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { useDecide, useHold } from '../api/use-hold';
import { DISPOSITION_SENTENCES, decisionWords } from './hold-words';
import { StaleEvidence } from './stale-evidence';

interface DecisionFields {
  disposition: DecisionRequest['disposition'] | null;
  reason: string;
  note: string;
  password: string;
}

const OFFERED: Disposition[] = ['release', 'scrap'];

/** The one place where ink is signed: disposition, reason, note, and the decider's password again. */
export function DecisionForm({ hold, onReadAgain }: { hold: HoldView; onReadAgain: () => void }) {
  const { me } = useSession();
  const { refetch } = useHold(hold.id);
  const decide = useDecide(hold.id);
  // The version that the decider has read. The page may show a newer one; then they read it again before they sign.
  const [readVersion, setReadVersion] = useState(hold.evidenceVersion);
  const offered = hold.mayDecide.dispositions.filter((item) => OFFERED.includes(item));
  const form = useForm<DecisionFields>({
    defaultValues: {
      disposition: offered.length === 1 ? (offered[0] as 'release') : null,
      reason: '',
      note: '',
      password: '',
    },
  });
  const { errors, isSubmitting } = form.formState;
  const disposition = useWatch({ control: form.control, name: 'disposition' });
  const isStale = readVersion !== hold.evidenceVersion;

  const send = form.handleSubmit(async ({ disposition: chosen, reason, note, password }) => {
    if (chosen === null || isStale) return;
    const body: DecisionRequest = {
      disposition: chosen,
      reason: reason.trim(),
      password,
      evidenceVersion: readVersion,
    };
    if (note.trim() !== '') body.note = note.trim();
    try {
      await decide.mutateAsync(body);
    } catch (error) {
      form.resetField('password');
      const renewed = asProblem(error).status === 409 ? await refetch() : null;
      const isOvertaken = renewed?.data !== undefined && renewed.data.evidenceVersion !== readVersion;
      if (!isOvertaken) showProblem(form, ['disposition', 'reason', 'note', 'password'], error);
    }
  });

  return (
    <form className="form decision" onSubmit={(event) => void send(event)} noValidate>
      <p className="soft">
        The verdict supports your decision; it does not replace the inspection, the customer’s requirements or the law
        that covers the product.
      </p>
      <fieldset className="decision__choice" aria-describedby={errors.disposition && 'disposition-error'}>
        <legend className="field__label">What happens to lot {hold.lot.number}</legend>
        {offered.map((item) => (
          <label key={item} className="choice">
            <input
              type="radio"
              value={item}
              {...form.register('disposition', {
                validate: (value) => value !== null || 'Choose what happens to the lot.',
              })}
            />
            {DISPOSITION_SENTENCES[item]}
          </label>
        ))}
        {errors.disposition?.message !== undefined && (
          <span className="field__error" id="disposition-error">
            {errors.disposition.message}
          </span>
        )}
      </fieldset>
      <Field label="Reason" hint="An auditor reads it a year from now." error={errors.reason?.message}>
        {(control) => (
          <textarea
            {...control}
            className="input input--area"
            {...form.register('reason', {
              validate: (text) => text.trim() !== '' || 'Give the reason of the decision.',
            })}
          />
        )}
      </Field>
      <Field label="Note" hint="May be left empty." error={errors.note?.message}>
        {(control) => <input {...control} className="input" autoComplete="off" {...form.register('note')} />}
      </Field>
      <Field label="Your password again" error={errors.password?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            type="password"
            autoComplete="current-password"
            {...form.register('password', { required: 'Your password stands for your signature.' })}
          />
        )}
      </Field>
      {isStale && (
        <StaleEvidence
          onReadAgain={() => {
            setReadVersion(hold.evidenceVersion);
            onReadAgain();
          }}
        />
      )}
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <p>
        Signed by <b>{me.name}</b>
        {disposition === null ? '.' : `: “${SIGNATURE_MEANINGS[disposition]}”.`}
      </p>
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting} isDisabled={isStale}>
          {decisionWords(disposition, hold.lot.number)}
        </Action>
      </div>
    </form>
  );
}

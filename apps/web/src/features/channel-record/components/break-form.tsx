import { BREAK_KINDS, type BreakKind, type ChannelView } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { ApiProblem } from '../../../shared/api/client';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useSession } from '../../../shared/session/session';
import { formatInstant, plantDay, plantInstant } from '../../../shared/time/plant-time';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useDeclareBreak } from '../api/use-declare-break';
import { BREAK_WORDS } from '../../../shared/record/record-words';

/** Typed rather than picked: a browser's own date field may swap day and month, and show 2 PM for 14:00. */
const TIME = /^([01]\d|2[0-3]):[0-5]\d$/;
const isDay = (text: string) =>
  (/^\d{4}-\d{2}-\d{2}$/.test(text) && !Number.isNaN(Date.parse(text))) || 'Give the day as 2026-12-01.';

interface BreakFields {
  day: string;
  time: string;
  kind: BreakKind;
  reason: string;
}

interface BreakFormProps {
  channel: ChannelView;
  /** Instant to begin with, epoch ms. */
  suggestedAt: number;
  onDone: () => void;
}

/** The request has one instant where the form has a day and a time: its error stands at the day. */
function atOnDay(error: unknown): unknown {
  if (!(error instanceof ApiProblem)) return error;
  const errors = error.errors.map((item) => (item.pointer === '/at' ? { ...item, pointer: '/day' } : item));
  return new ApiProblem({ ...error, correlationId: error.correlationId ?? undefined, errors });
}

/** The instant at which something was done to the gauge or the process, so that the baseline starts afresh there. */
export function BreakForm({ channel, suggestedAt, onDone }: BreakFormProps) {
  const { plant } = useSession();
  const toast = useToast();
  const declare = useDeclareBreak(channel.id);
  const form = useForm<BreakFields>({
    defaultValues: {
      day: plantDay(suggestedAt, plant.timeZone),
      time: formatInstant(suggestedAt, plant.timeZone, 'time'),
      kind: 'adjustment',
      reason: '',
    },
  });
  const { errors } = form.formState;
  const send = form.handleSubmit(async ({ day, time, kind, reason }) => {
    const at = plantInstant(day, time, plant.timeZone);
    try {
      await declare.mutateAsync({ at, kind, reason: reason.trim() });
      toast.done(
        `Break declared at ${formatInstant(at, plant.timeZone, 'short')}. ${channel.name} is being judged again.`,
      );
      onDone();
    } catch (error) {
      showProblem(form, ['day', 'kind', 'reason'], atOnDay(error));
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <p>
        A baseline borrows nothing across a break: the first lots after it are not scored until enough of them are
        known.
      </p>
      <div className="break-form__row">
        <Field label="Day, year-month-day" error={errors.day?.message}>
          {(control) => (
            <input
              {...control}
              className="input"
              placeholder="2026-12-01"
              autoComplete="off"
              {...form.register('day', { validate: isDay })}
            />
          )}
        </Field>
        <Field label={`Time, 24 h, ${plant.timeZone}`} error={errors.time?.message}>
          {(control) => (
            <input
              {...control}
              className="input"
              placeholder="14:05"
              autoComplete="off"
              {...form.register('time', {
                pattern: { value: TIME, message: 'Give the time as 14:05.' },
                required: 'Say at what time it was done.',
              })}
            />
          )}
        </Field>
        <Field label="What was done" error={errors.kind?.message}>
          {(control) => (
            <select {...control} className="input" {...form.register('kind')}>
              {BREAK_KINDS.map((kind) => (
                <option key={kind} value={kind}>
                  {BREAK_WORDS[kind]}
                </option>
              ))}
            </select>
          )}
        </Field>
      </div>
      <Field label="Reason" hint="It stands beside the break in the record." error={errors.reason?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            autoComplete="off"
            {...form.register('reason', {
              validate: (text) => text.trim() !== '' || 'Say why the baseline shall start afresh.',
            })}
          />
        )}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={form.formState.isSubmitting}>
          Declare the break
        </Action>
        <Action kind="quiet" onPress={onDone}>
          Leave it
        </Action>
      </div>
    </form>
  );
}

import type { LineView, PersonView } from '@app/contracts';
import { useEffect, useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useChangeRoles, usePersonAction } from '../api/people';
import { RolesFields, type RolesValues } from './roles-fields';

interface PersonFormProps {
  plantId: number;
  person: PersonView;
  lines: LineView[];
  isYourself: boolean;
  onClose: () => void;
}

/** What may be changed of one person: roles and lines, and whether they may sign in. */
export function PersonForm({ plantId, person, lines, isYourself, onClose }: PersonFormProps) {
  const change = useChangeRoles(plantId, person.id);
  const act = usePersonAction(plantId, person.id);
  const { done, failed } = useToast();
  const [isLeaving, setIsLeaving] = useState(false);
  const element = useRef<HTMLFormElement>(null);
  // The form opens below the table: whoever opened it by keyboard goes on in it.
  useEffect(() => element.current?.querySelector('input')?.focus(), []);
  const form = useForm<RolesValues>({
    defaultValues: { roles: person.roles, lineIds: person.lineIds.map(String) },
  });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ roles, lineIds }) => {
    if (roles.length === 0 && !isLeaving) {
      setIsLeaving(true);
      return;
    }
    try {
      await change.mutateAsync({ roles, lineIds: lineIds.map(Number) });
      done(roles.length === 0 ? `${person.name} is nobody at the plant now.` : `${person.name}’s roles are changed.`);
      onClose();
    } catch (error) {
      showProblem(form, ['roles', 'lineIds'], error);
    }
  });
  const perform = async (what: 'invitation' | 'disable' | 'enable', sentence: string) => {
    try {
      await act.mutateAsync(what);
      done(sentence);
    } catch (error) {
      failed(error);
    }
  };
  return (
    <form ref={element} className="form" onSubmit={(event) => void send(event)} noValidate>
      <RolesFields form={form} lines={lines} />
      {isLeaving && (
        <p role="status">
          Without any role {person.name} sees nothing of this plant any more. What they did and signed stays. Press
          again to take them out.
        </p>
      )}
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          {isLeaving ? `Take ${person.name} out of the plant` : 'Keep these roles'}
        </Action>
        {person.state === 'invited' && (
          <Action
            kind="quiet"
            isBusy={act.isPending}
            onPress={() => void perform('invitation', `A new mail to ${person.email} is on its way.`)}
          >
            Send the invitation again
          </Action>
        )}
        {person.state === 'disabled' ? (
          <Action
            kind="quiet"
            isBusy={act.isPending}
            onPress={() => void perform('enable', `${person.name} may sign in again.`)}
          >
            Enable {person.name}
          </Action>
        ) : (
          !isYourself && (
            <Action
              kind="quiet"
              isBusy={act.isPending}
              onPress={() => void perform('disable', `${person.name} is disabled; every session has ended.`)}
            >
              Disable {person.name}
            </Action>
          )
        )}
        <Action kind="plain" onPress={onClose}>
          Close
        </Action>
      </div>
    </form>
  );
}

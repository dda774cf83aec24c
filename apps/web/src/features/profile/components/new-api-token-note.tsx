import type { NewApiToken } from '@app/contracts';
import { useEffect, useRef, useState } from 'react';
import { Field } from '../../../shared/forms/field';
import { Action } from '../../../shared/ui/action';

/** The one time that a token is shown. */
export function NewApiTokenNote({ token, onClose }: { token: NewApiToken; onClose: () => void }) {
  const input = useRef<HTMLInputElement>(null);
  const [outcome, setOutcome] = useState('');
  useEffect(() => input.current?.focus(), []);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(token.token);
      setOutcome('Copied.');
    } catch {
      // Browsers keep the clipboard from pages without TLS; the selected text can be copied by hand.
      input.current?.select();
      setOutcome('This browser does not let the page copy. The token is selected: copy it by hand.');
    }
  };
  return (
    <div className="form profile__note">
      <Field
        label={`The new token: ${token.name}`}
        hint="It is shown only this once: copy it now to where it is used. Who has it sends workbooks in your name."
      >
        {(control) => (
          <input
            {...control}
            ref={input}
            className="input"
            readOnly
            spellCheck={false}
            value={token.token}
            onFocus={(event) => event.target.select()}
          />
        )}
      </Field>
      <div className="form__actions">
        <Action kind="quiet" onPress={() => void copy()}>
          Copy the token
        </Action>
        <Action kind="plain" onPress={onClose}>
          I have copied it
        </Action>
      </div>
      <p role="status">{outcome}</p>
    </div>
  );
}

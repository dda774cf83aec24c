import { useState, type ComponentProps } from 'react';

/** A new password, hidden until its writer wants to see it; it is asked for once, so that seeing it is the check. */
export function NewPasswordInput(props: Omit<ComponentProps<'input'>, 'type' | 'autoComplete'>) {
  const [isShown, setIsShown] = useState(false);
  return (
    <span className="new-password">
      <input
        {...props}
        className="input"
        type={isShown ? 'text' : 'password'}
        autoComplete="new-password"
        autoCapitalize="none"
        spellCheck={false}
      />
      <button
        type="button"
        className="action action--plain"
        aria-controls={props.id}
        onClick={() => setIsShown(!isShown)}
      >
        {isShown ? 'Hide the password' : 'Show the password'}
      </button>
    </span>
  );
}

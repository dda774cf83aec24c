import { Button } from 'primereact/button';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

/** `main`: the one thing to press. `quiet`: beside it. `plain`: reads as a link. */
export type ActionKind = 'main' | 'quiet' | 'plain';

interface ActionProps {
  kind?: ActionKind;
  type?: 'button' | 'submit';
  isBusy?: boolean;
  isDisabled?: boolean;
  onPress?: () => void;
  /** Where the words on it do not say enough on their own. */
  label?: string;
  children: ReactNode;
}

/** A button; its words say what happens. */
export function Action({ kind = 'main', type = 'button', isBusy, isDisabled, onPress, label, children }: ActionProps) {
  return (
    <Button
      className={`action action--${kind}`}
      type={type}
      disabled={isDisabled === true || isBusy === true}
      aria-busy={isBusy === true || undefined}
      aria-label={label}
      onClick={onPress}
    >
      {children}
    </Button>
  );
}

/** A link that looks like an action. */
export function ActionLink({
  to,
  kind = 'main',
  label,
  children,
}: { to: string } & Pick<ActionProps, 'kind' | 'label' | 'children'>) {
  return (
    <Link className={`action action--${kind}`} to={to} aria-label={label}>
      {children}
    </Link>
  );
}

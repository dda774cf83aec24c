import { accountMail } from './account-page';
import type { Mail } from './layout';

export interface PasswordResetFacts {
  name: string;
  url: string;
  /** "11 Mar 2026, 13:00 (Europe/London)" */
  until: string;
}

/** The link with which somebody who forgot their password chooses another. */
export function passwordResetMail({ name, url, until }: PasswordResetFacts): Mail {
  return accountMail(
    'Choose a new password for Ebbline',
    [
      `Somebody, we think you, asked for a new password for ${name}.`,
      `The link works once, until ${until}. Choosing a new password ends every session that is open with the old one.`,
    ],
    { label: 'Choose a new password', url },
    'Sent by Ebbline because this address was entered under “Forgotten your password?”. If that was not you, leave it: your password stays as it is.',
  );
}

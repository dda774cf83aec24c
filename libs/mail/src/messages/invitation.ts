import { accountMail } from './account-page';
import type { Mail } from './layout';

export interface InvitationFacts {
  name: string;
  plantName: string;
  /** Who invited. */
  by: string;
  /** "quality engineer and line lead" */
  roles: string;
  /** Names of the lines that the person is assigned to. */
  lines: string[];
  url: string;
  /** "18 Mar 2026, 13:00 (Europe/London)"; null for somebody who has a password already: the link then leads to the desk. */
  until: string | null;
}

/** Asks somebody to a plant: with a link to choose a password, or, where they have one already, with the news alone. */
export function invitationMail(facts: InvitationFacts): Mail {
  const { plantName, by, until } = facts;
  const lines = facts.lines.length === 0 ? '' : `, assigned to ${joined(facts.lines)}`;
  const opening = `${by} invites you, ${facts.name}, to ${plantName} on Ebbline as ${facts.roles}${lines}.`;
  if (until === null)
    return accountMail(
      `${plantName} on Ebbline: you have a role there now`,
      [opening, 'Sign in with your e-mail address and the password that you have.'],
      { label: 'Open Ebbline', url: facts.url },
      `Sent by Ebbline because ${by} gave you a role at ${plantName}.`,
    );
  return accountMail(
    `${plantName} on Ebbline: an invitation for you`,
    [opening, `Choose a password to begin. The link works once, until ${until}; ${by} can send a new one.`],
    { label: 'Choose your password', url: facts.url },
    `Sent by Ebbline because ${by} entered this address. If you know nothing of it, leave it: nothing happens without the link.`,
  );
}

/** "Kiln 1, Kiln 2 and Press 4" */
const joined = (names: string[]): string =>
  names.length < 2 ? names.join() : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;

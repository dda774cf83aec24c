import { type LineView, type PersonView, ROLE_NAMES } from '@app/contracts';
import { formatInstant } from '../../shared/time/plant-time';

export const roleWords = (person: PersonView) => person.roles.map((role) => ROLE_NAMES[role]).join(', ');

export const lineWords = (person: PersonView, lines: LineView[]) =>
  lines
    .filter((line) => person.lineIds.includes(line.id))
    .map((line) => line.name)
    .join(', ') || 'none';

export function stateWords(person: PersonView, timeZone: string, now: number): string {
  if (person.state === 'active') return 'may sign in';
  if (person.state === 'disabled') return 'disabled';
  if (person.invitedUntil === null) return 'invited; the link has ended';
  const until = formatInstant(person.invitedUntil, timeZone, 'short');
  return new Date(person.invitedUntil).getTime() > now ? `invited until ${until}` : `invitation expired ${until}`;
}

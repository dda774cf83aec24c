import { type PersonView, type Role, ROLE_NAMES } from '@app/contracts';
import type { PlantPerson } from '@app/data';

export function personView(person: PlantPerson): PersonView {
  const { id, name, email, roles, lineIds } = person;
  const state = person.disabledAt ? 'disabled' : person.hasPassword ? 'active' : 'invited';
  const invitedUntil = state === 'invited' ? (person.invitedUntil?.toISOString() ?? null) : null;
  return { id, name, email, roles, lineIds, state, invitedUntil };
}

/** "quality engineer and line lead" */
export function rolesText(roles: readonly Role[]): string {
  const names = roles.map((role) => ROLE_NAMES[role]);
  return names.length < 2 ? (names[0] ?? 'nobody') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

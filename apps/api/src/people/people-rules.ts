import { DomainError } from '@app/contracts';
import { countOtherAdministrators, listLineNames, type PlantPerson, type Transaction } from '@app/data';

export const conflict = (code: string, detail: string) => new DomainError('conflict', code, detail);

/** A plant is never left without somebody who can administer it. Lock the plant first. */
export async function requireAnotherAdministrator(
  tx: Transaction,
  plantId: number,
  person: { id: number; name: string },
): Promise<void> {
  if ((await countOtherAdministrators(tx, plantId, person.id)) > 0) return;
  throw conflict(
    'last-administrator',
    `${person.name} is the last who can administer the plant. Make somebody else administrator first, and let them sign in.`,
  );
}

/** The named lines; every one of them must be the plant's. */
export async function requireLines(
  tx: Transaction,
  plantId: number,
  lineIds: readonly number[],
): Promise<{ id: number; name: string }[]> {
  const found = await listLineNames(tx, plantId, lineIds);
  if (found.length === lineIds.length) return found;
  const detail = 'One of the lines is not a line of this plant.';
  throw new DomainError('invalid', 'unknown-line', detail, [{ pointer: '/lineIds', code: 'unknown-line', detail }]);
}

/** Whether somebody may sign in is decided for the whole person: nobody decides it over another plant's administrators. */
export function requireWholePerson(person: PlantPerson, plants: { isAdministeredBy: boolean }[]): void {
  if (plants.every((plant) => plant.isAdministeredBy)) return;
  throw conflict(
    'is-elsewhere',
    `${person.name} also works at a plant that you do not administer. Take away the roles here instead.`,
  );
}

import type { Role, Theme } from '@app/contracts';
import { withConflicts } from './conflicts';
import { findRow, type Queryable, rows, type Transaction } from './database';

/** A person who has no password yet. */
export async function insertPerson(
  tx: Transaction,
  person: { email: string; name: string; createdAt: Date },
): Promise<number> {
  const inserted = await tx('people')
    .insert({ email: person.email.toLowerCase(), name: person.name, created_at: person.createdAt })
    .returning<{ id: number }[]>('id');
  return inserted[0].id;
}

export async function updatePassword(tx: Transaction, personId: number, passwordHash: string): Promise<void> {
  await tx('people').where({ id: personId }).update({ password_hash: passwordHash });
}

/** Sets what is given; an address that somebody else has is a conflict. */
export async function updatePerson(
  tx: Transaction,
  personId: number,
  changes: { name?: string; email?: string; theme?: Theme },
): Promise<void> {
  const email = changes.email?.toLowerCase();
  const given = Object.entries({ ...changes, email }).filter(([, value]) => value !== undefined);
  if (given.length === 0) return;
  await withConflicts(
    { people_email_key: { code: 'email-taken', detail: 'Somebody else signs in with this e-mail address.' } },
    () => tx('people').where({ id: personId }).update(Object.fromEntries(given)),
  );
}

export async function updatePersonDisabled(tx: Transaction, personId: number, at: Date | null): Promise<void> {
  await tx('people').where({ id: personId }).update({ disabled_at: at });
}

/** Sets a person's roles at a plant and the lines there that the person is assigned to. */
export async function replaceRoles(
  tx: Transaction,
  plantId: number,
  personId: number,
  wanted: { roles: readonly Role[]; lineIds: readonly number[] },
): Promise<void> {
  const person = { plant_id: plantId, person_id: personId };
  await tx('memberships').where(person).delete();
  await tx('line_assignments').where(person).delete();
  if (wanted.roles.length > 0)
    await tx('memberships').insert([...new Set(wanted.roles)].map((role) => ({ ...person, role })));
  if (wanted.lineIds.length > 0)
    await tx('line_assignments').insert([...new Set(wanted.lineIds)].map((id) => ({ ...person, line_id: id })));
}

/** The lines of the plant among these. */
export async function listLineNames(
  db: Queryable,
  plantId: number,
  lineIds: readonly number[],
): Promise<{ id: number; name: string }[]> {
  return rows(db, `select id, name from lines where plant_id = :plantId and id = any(:lineIds) order by name`, {
    plantId,
    lineIds: [...lineIds],
  });
}

/**
 * Makes changes of who administers a plant wait for one another, so that two administrators who take each other's role at the same time
 * do not leave it with none.
 */
export async function lockPlants(tx: Transaction, plantIds: readonly number[]): Promise<void> {
  await tx.raw(`select id from plants where id = any(?) order by id for no key update`, [[...plantIds]]);
}

/** How many people beside this one administer the plant and can sign in to do it. */
export async function countOtherAdministrators(tx: Transaction, plantId: number, personId: number): Promise<number> {
  const found = await findRow<{ count: number }>(
    tx,
    `select count(*)::int as count from memberships m join people p on p.id = m.person_id
     where m.plant_id = :plantId and m.role = 'administrator' and p.id <> :personId
       and p.disabled_at is null and p.password_hash is not null`,
    { plantId, personId },
  );
  return found?.count ?? 0;
}

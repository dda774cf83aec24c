import type { Role, Theme } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';

export interface Person {
  id: number;
  name: string;
  email: string;
  /** From where the person acts in this request; unknown to work that is done later in the person's name. */
  address?: string;
  /** A script or line computer acts by the person's API token: as a quality engineer of this plant alone. */
  machine?: { plantId: number; name: string };
}

export interface PersonWithPassword extends Person {
  /** Null until an invited person has chosen a password. */
  passwordHash: string | null;
}

/** The person who may sign in under this address; not one who is disabled. */
export function findPersonForSignIn(db: Queryable, email: string): Promise<PersonWithPassword | undefined> {
  return findRow<PersonWithPassword>(
    db,
    `select id, name, email, password_hash as "passwordHash" from people
     where email = lower(:email) and disabled_at is null`,
    { email },
  );
}

export function findPersonWithPassword(db: Queryable, id: number): Promise<PersonWithPassword | undefined> {
  return findRow<PersonWithPassword>(
    db,
    `select id, name, email, password_hash as "passwordHash" from people where id = :id and disabled_at is null`,
    { id },
  );
}

/** The person unless disabled. */
export function findPerson(db: Queryable, id: number): Promise<Person | undefined> {
  return findRow<Person>(db, `select id, name, email from people where id = :id and disabled_at is null`, { id });
}

/** What the person has chosen for the pages. */
export async function getTheme(db: Queryable, id: number): Promise<Theme> {
  return (await findRow<{ theme: Theme }>(db, `select theme from people where id = :id`, { id }))?.theme ?? 'system';
}

/** The roles of a person at a plant; none: the person is nobody there. */
export async function listRoles(db: Queryable, personId: number, plantId: number): Promise<Role[]> {
  const found = await rows<{ role: Role }>(
    db,
    `select role from memberships where person_id = :personId and plant_id = :plantId order by role`,
    { personId, plantId },
  );
  return found.map((row) => row.role);
}

export interface MembershipRow {
  plantId: number;
  plantName: string;
  timeZone: string;
  roles: Role[];
  lineIds: number[];
}

/** Where a person is somebody, and the lines there that the person is assigned to. */
export function listMemberships(db: Queryable, personId: number): Promise<MembershipRow[]> {
  return rows<MembershipRow>(
    db,
    `select p.id as "plantId", p.name as "plantName", p.time_zone as "timeZone",
            array_agg(m.role order by m.role) as roles,
            coalesce((select json_agg(a.line_id order by a.line_id) from line_assignments a
                      where a.person_id = :personId and a.plant_id = p.id), '[]') as "lineIds"
     from memberships m join plants p on p.id = m.plant_id
     where m.person_id = :personId group by p.id order by p.name`,
    { personId },
  );
}

/** Whether anybody signs in with the demo's shared password. */
export async function hasDemoPeople(db: Queryable): Promise<boolean> {
  return (await findRow(db, 'select 1 from people where is_demo limit 1')) !== undefined;
}

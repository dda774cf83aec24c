import type { Role } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface PlantPerson {
  id: number;
  plantId: number;
  name: string;
  email: string;
  roles: Role[];
  lineIds: number[];
  hasPassword: boolean;
  disabledAt: Date | null;
  /** When the newest unused link of an invitation ends. */
  invitedUntil: Date | null;
}

const COLUMNS = `p.id, m.plant_id as "plantId", p.name, p.email, m.roles, p.password_hash is not null as "hasPassword",
  p.disabled_at as "disabledAt",
  coalesce((select json_agg(a.line_id order by a.line_id) from line_assignments a
            where a.person_id = p.id and a.plant_id = m.plant_id), '[]') as "lineIds",
  (select max(t.expires_at) from person_tokens t where t.person_id = p.id and p.password_hash is null
     and t.purpose in ('invitation', 'first_administrator') and t.used_at is null and t.revoked_at is null) as "invitedUntil"`;

const FROM = `from people p join (
  select plant_id, person_id, array_agg(role order by role) as roles from memberships group by plant_id, person_id
) m on m.person_id = p.id and m.plant_id = :plantId`;

/** Who has a role at the plant. */
export function listPlantPeople(db: Queryable, plantId: number): Promise<PlantPerson[]> {
  return rows<PlantPerson>(db, `select ${COLUMNS} ${FROM} order by lower(p.name), p.id`, { plantId });
}

export function findPlantPerson(db: Queryable, plantId: number, personId: number): Promise<PlantPerson | undefined> {
  return findRow<PlantPerson>(db, `select ${COLUMNS} ${FROM} where p.id = :personId`, { plantId, personId });
}

export interface KnownPerson {
  id: number;
  name: string;
  email: string;
  hasPassword: boolean;
  disabledAt: Date | null;
}

/** Who has this address, locked until the transaction ends. */
export function findPersonByEmail(tx: Transaction, email: string): Promise<KnownPerson | undefined> {
  return findRow<KnownPerson>(
    tx,
    `select id, name, email, password_hash is not null as "hasPassword", disabled_at as "disabledAt"
     from people where email = lower(:email) for no key update`,
    { email },
  );
}

/** Where the person is somebody, and whether the other one is an administrator there. */
export function listPlantsOfPerson(
  db: Queryable,
  personId: number,
  administratorId: number,
): Promise<{ plantId: number; plantName: string; timeZone: string; isAdministeredBy: boolean }[]> {
  return rows(
    db,
    `select p.id as "plantId", p.name as "plantName", p.time_zone as "timeZone", exists (
       select 1 from memberships a where a.plant_id = p.id and a.person_id = :administratorId and a.role = 'administrator'
     ) as "isAdministeredBy"
     from plants p where p.id in (select plant_id from memberships where person_id = :personId) order by p.id`,
    { personId, administratorId },
  );
}

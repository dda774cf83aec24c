import { findRow, type Queryable, rows, type Transaction } from './database';
import { insertPerson } from './people-changes';

/** What an installation without any plant knows of who makes the first one. */
export interface FirstAdministrator {
  personId: number;
  email: string;
  /** Whether the link was used: the person has a password. */
  hasBegun: boolean;
}

export async function hasPlants(db: Queryable): Promise<boolean> {
  return (await findRow(db, 'select 1 from plants limit 1')) !== undefined;
}

/** The person whom the installation begins with; made with this address when there is nobody yet. Undefined: it has other people already. */
export async function getFirstAdministrator(
  tx: Transaction,
  email: string,
  at: Date,
): Promise<FirstAdministrator | undefined> {
  await tx.raw(`select pg_advisory_xact_lock(hashtextextended('first-administrator', 0))`);
  const [known] = await rows<FirstAdministrator>(
    tx,
    `select p.id as "personId", p.email, p.password_hash is not null as "hasBegun" from people p
     where p.disabled_at is null and exists (select 1 from person_tokens t where t.person_id = p.id and t.purpose = 'first_administrator')
     order by p.id limit 1`,
  );
  if (known) return known;
  if ((await findRow(tx, 'select 1 from people limit 1')) !== undefined) return undefined;
  const personId = await insertPerson(tx, { email, name: 'Administrator', createdAt: at });
  return { personId, email: email.toLowerCase(), hasBegun: false };
}

import type { LinkPurpose } from '@app/contracts';
import { findRow, type Queryable, type Transaction } from './database';

export interface NewPersonToken {
  personId: number;
  purpose: LinkPurpose;
  tokenHash: Buffer;
  createdAt: Date;
  expiresAt: Date;
}

export interface PersonToken {
  id: number;
  personId: number;
  purpose: LinkPurpose;
  expiresAt: Date;
  usedAt: Date | null;
  revokedAt: Date | null;
  name: string;
  email: string;
}

/** Makes a link's token and revokes those of the person for the same purpose: only the newest link works. Gives its id. */
export async function insertPersonToken(tx: Transaction, token: NewPersonToken): Promise<number> {
  await updatePersonTokensRevoked(tx, token.personId, [token.purpose], token.createdAt);
  const inserted = await tx('person_tokens')
    .insert({
      person_id: token.personId,
      purpose: token.purpose,
      token_hash: token.tokenHash,
      created_at: token.createdAt,
      expires_at: token.expiresAt,
    })
    .returning<{ id: number }[]>('id');
  return inserted[0].id;
}

/** Whose token it is, whatever became of it; not that of a person who is disabled. */
export function findPersonToken(db: Queryable, tokenHash: Buffer): Promise<PersonToken | undefined> {
  return findRow<PersonToken>(
    db,
    `select t.id, t.person_id as "personId", t.purpose, t.expires_at as "expiresAt", t.used_at as "usedAt",
            t.revoked_at as "revokedAt", p.name, p.email
     from person_tokens t join people p on p.id = t.person_id where t.token_hash = :tokenHash and p.disabled_at is null`,
    { tokenHash },
  );
}

/** Uses the token up and says whether that was still possible: of several at once, one. */
export async function updatePersonTokenUsed(tx: Transaction, id: number, at: Date): Promise<boolean> {
  const used = await findRow(
    tx,
    `update person_tokens set used_at = :at
     where id = :id and used_at is null and revoked_at is null and expires_at > :at returning id`,
    { id, at },
  );
  return used !== undefined;
}

/** Ends the person's unused links of these purposes. */
export async function updatePersonTokensRevoked(
  tx: Transaction,
  personId: number,
  purposes: readonly LinkPurpose[],
  at: Date,
): Promise<void> {
  await tx('person_tokens')
    .where({ person_id: personId })
    .whereIn('purpose', [...purposes])
    .whereNull('used_at')
    .whereNull('revoked_at')
    .update({ revoked_at: at });
}

/** Whether the person came by the link that an empty installation prints: who makes the first plant. */
export async function isInstallationAdministrator(db: Queryable, personId: number): Promise<boolean> {
  const used = await findRow(
    db,
    `select 1 from person_tokens t join people p on p.id = t.person_id
     where t.person_id = :personId and t.purpose = 'first_administrator' and t.used_at is not null and p.disabled_at is null
     limit 1`,
    { personId },
  );
  return used !== undefined;
}

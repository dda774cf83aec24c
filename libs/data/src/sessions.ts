import { findRow, type Queryable, type Transaction } from './database';

export interface RefreshSession {
  id: number;
  personId: number;
  family: string;
  issuedAt: Date;
  expiresAt: Date;
  usedAt: Date | null;
  revokedAt: Date | null;
}

export interface NewRefreshSession {
  personId: number;
  family: string;
  tokenHash: Buffer;
  issuedAt: Date;
  expiresAt: Date;
}

export async function insertRefreshSession(tx: Queryable, session: NewRefreshSession): Promise<void> {
  await tx('refresh_sessions').insert({
    person_id: session.personId,
    family: session.family,
    token_hash: session.tokenHash,
    issued_at: session.issuedAt,
    expires_at: session.expiresAt,
  });
}

/** The session of a token, with its whole family locked until the transaction ends: a revoked family gets no further token. */
export async function findRefreshSession(tx: Transaction, tokenHash: Buffer): Promise<RefreshSession | undefined> {
  const found = await findRow<{ family: string }>(
    tx,
    `select family from refresh_sessions where token_hash = :tokenHash`,
    { tokenHash },
  );
  if (!found) return undefined;
  await tx.raw(`select pg_advisory_xact_lock(hashtextextended(:family, 0))`, found);
  return findRow<RefreshSession>(
    tx,
    `select id, person_id as "personId", family, issued_at as "issuedAt", expires_at as "expiresAt",
            used_at as "usedAt", revoked_at as "revokedAt"
     from refresh_sessions where token_hash = :tokenHash`,
    { tokenHash },
  );
}

export async function updateRefreshSessionUsed(tx: Transaction, id: number, at: Date): Promise<void> {
  await tx('refresh_sessions').where({ id }).whereNull('used_at').update({ used_at: at });
}

/** Ends every token of the family; the caller has found one of them in this transaction. */
export async function updateFamilyRevoked(tx: Transaction, family: string, at: Date): Promise<void> {
  await tx('refresh_sessions').where({ family }).whereNull('revoked_at').update({ revoked_at: at });
}

/** Ends every session of the person, but the family that is to be kept. */
export async function updateSessionsRevoked(
  tx: Transaction,
  personId: number,
  at: Date,
  keptFamily?: string,
): Promise<void> {
  const which = { personId, keptFamily: keptFamily ?? null, at };
  const isOpen = `person_id = :personId and revoked_at is null and family is distinct from cast(:keptFamily as uuid)`;
  // A refresh under way holds its family's lock: the token that it brings is seen by the statement below.
  await tx.raw(
    `select pg_advisory_xact_lock(hashtextextended(cast(family as text), 0))
     from (select distinct family from refresh_sessions where ${isOpen} order by family) as f`,
    which,
  );
  await tx.raw(`update refresh_sessions set revoked_at = :at where ${isOpen}`, which);
}

/** Whether anything of the family of tokens is left: an access token ends with the sign-in that it came of. */
export async function isFamilyAlive(db: Queryable, personId: number, family: string): Promise<boolean> {
  const alive = await findRow(
    db,
    `select 1 from refresh_sessions where family = :family and person_id = :personId and revoked_at is null limit 1`,
    { family, personId },
  );
  return alive !== undefined;
}

/** Tokens that can bring nothing any more, kept for a while so that their reuse is still seen. */
export async function deleteSessionsExpiredBefore(db: Queryable, at: Date): Promise<void> {
  await db('refresh_sessions').where('expires_at', '<', at).delete();
}

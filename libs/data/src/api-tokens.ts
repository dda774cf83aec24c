import { findRow, rows, type Queryable, type Transaction } from './database';

/** A token by which a script or line computer sends workbooks as a person of one plant; only its hash is kept. */
export interface ApiTokenRow {
  id: number;
  plantId: number;
  personId: number;
  name: string;
  createdAt: Date;
  lastUsedAt: Date | null;
  revokedAt: Date | null;
}

const COLUMNS = `id, plant_id as "plantId", person_id as "personId", name, created_at as "createdAt", last_used_at as "lastUsedAt",
  revoked_at as "revokedAt"`;

export async function insertApiToken(
  tx: Transaction,
  token: { plantId: number; personId: number; name: string; tokenHash: Buffer; createdAt: Date },
): Promise<ApiTokenRow> {
  const [row] = await rows<ApiTokenRow>(
    tx,
    `insert into api_tokens (plant_id, person_id, name, token_hash, created_at)
     values (:plantId, :personId, :name, :tokenHash, :createdAt) returning ${COLUMNS}`,
    token,
  );
  return row;
}

/** A person's tokens at a plant, newest first. */
export function listApiTokens(db: Queryable, plantId: number, personId: number): Promise<ApiTokenRow[]> {
  return rows<ApiTokenRow>(
    db,
    `select ${COLUMNS} from api_tokens where plant_id = :plantId and person_id = :personId order by created_at desc, id desc`,
    { plantId, personId },
  );
}

/** The token of this hash, if it is in force and its person is not disabled. */
export function findApiTokenByHash(db: Queryable, tokenHash: Buffer): Promise<ApiTokenRow | undefined> {
  return findRow<ApiTokenRow>(
    db,
    `select ${COLUMNS} from api_tokens t where token_hash = :tokenHash and revoked_at is null
       and exists (select 1 from people p where p.id = t.person_id and p.disabled_at is null)`,
    { tokenHash },
  );
}

/** Notes the use, at most once a minute. */
export async function updateApiTokenUsed(db: Queryable, id: number, at: Date): Promise<void> {
  await db.raw(
    `update api_tokens set last_used_at = :at
     where id = :id and (last_used_at is null or last_used_at < cast(:at as timestamptz) - interval '1 minute')`,
    { id, at },
  );
}

/** Whether it was still in force. */
export async function updateApiTokenRevoked(tx: Transaction, id: number, at: Date): Promise<boolean> {
  return (await tx('api_tokens').where({ id }).whereNull('revoked_at').update({ revoked_at: at })) > 0;
}

/** Ends a person's tokens: everywhere, or at one plant. */
export async function updateApiTokensRevoked(
  tx: Transaction,
  personId: number,
  at: Date,
  plantId?: number,
): Promise<void> {
  const tokens = tx('api_tokens').where({ person_id: personId }).whereNull('revoked_at');
  await (plantId === undefined ? tokens : tokens.where({ plant_id: plantId })).update({ revoked_at: at });
}

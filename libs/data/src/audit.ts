import type { Transaction } from './database';

export interface AuditEntry {
  plantId: number | null;
  at: Date;
  actor: { id: number; name: string; address?: string } | null;
  action: string;
  thingKind: string;
  thingId: number;
  /** "Marta Lindqvist released lot 24117": who did what, whole. */
  sentence: string;
  before?: unknown;
  after?: unknown;
  /** Only where it is not the actor's own. */
  address?: string | null;
}

/** Writes the entry in the transaction of the change that it records. */
export async function insertAuditEntry(tx: Transaction, entry: AuditEntry): Promise<void> {
  await tx('audit_entries').insert({
    plant_id: entry.plantId,
    at: entry.at,
    actor_id: entry.actor?.id ?? null,
    actor_name: entry.actor?.name ?? 'Ebbline',
    action: entry.action,
    thing_kind: entry.thingKind,
    thing_id: entry.thingId,
    sentence: entry.sentence,
    before: entry.before === undefined ? null : JSON.stringify(entry.before),
    after: entry.after === undefined ? null : JSON.stringify(entry.after),
    address: entry.address ?? entry.actor?.address ?? null,
  });
}

/** What was done to a thing, oldest first. */
export async function listHistory(
  db: Transaction | import('./database').Database,
  things: { kind: string; id: number }[],
): Promise<{ at: Date; actorName: string; actorId: number | null; sentence: string }[]> {
  if (things.length === 0) return [];
  const entries = await db('audit_entries')
    .whereIn(
      ['thing_kind', 'thing_id'],
      things.map(({ kind, id }) => [kind, id]),
    )
    .orderBy('at')
    .orderBy('id')
    .select<{ at: Date; actor_name: string; actor_id: number | null; sentence: string }[]>(
      'at',
      'actor_name',
      'actor_id',
      'sentence',
    );
  return entries.map((entry) => ({
    at: entry.at,
    actorName: entry.actor_name,
    actorId: entry.actor_id,
    sentence: entry.sentence,
  }));
}

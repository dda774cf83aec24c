import { findRow, type Queryable, rows, type Transaction } from './database';

export interface OutboxAttachment {
  fileName: string;
  mediaType: string;
  /** Set: shown inline where the HTML names it as `cid:<contentId>`. */
  contentId: string | null;
  bytes: Buffer;
}

export interface OutboxMail {
  event: string;
  kind: string;
  recipient: string;
  subject: string;
  html: string;
  text: string;
}

export interface WaitingMail extends OutboxMail {
  id: number;
  messageId: string;
  attempts: number;
}

/** What goes with a mail, in the order in which it was written. */
export function listOutboxAttachments(db: Queryable, outboxId: number): Promise<OutboxAttachment[]> {
  return rows<OutboxAttachment>(
    db,
    `select file_name as "fileName", media_type as "mediaType", content_id as "contentId", bytes from outbox_attachments
     where outbox_id = :outboxId order by id`,
    { outboxId },
  );
}

/**
 * Writes mails in the transaction of the event that they tell of. The same event, recipient and kind is one mail. Returns the new ids.
 * What goes with them goes with each. Without a plant they stand on no plant's page of mails.
 * The Message-ID is made here, once: two installations number their events alike, but none may pass for the other's.
 */
export async function insertMails(
  tx: Transaction,
  plantId: number | null,
  mails: OutboxMail[],
  at: Date,
  attachments: OutboxAttachment[] = [],
): Promise<number[]> {
  if (mails.length === 0) return [];
  const inserted = await rows<{ id: number }>(
    tx,
    `insert into outbox (plant_id, event, kind, recipient, subject, html, plain_text, message_id, next_attempt_at, created_at)
     select :plantId, m.event, m.kind, m.recipient, m.subject, m.html, m.text,
       '<' || gen_random_uuid() || '@ebbline>', :at, :at
     from jsonb_to_recordset(:mails) as m(event text, kind text, recipient text, subject text, html text, text text)
     on conflict (event, recipient, kind) do nothing returning id`,
    { plantId, at, mails: JSON.stringify(mails) },
  );
  const ids = inserted.map((row) => row.id);
  for (const { fileName, mediaType, contentId, bytes } of ids.length > 0 ? attachments : [])
    await tx.raw(
      `insert into outbox_attachments (outbox_id, file_name, media_type, content_id, bytes)
       select m.id, :fileName, :mediaType, :contentId, :bytes from unnest(cast(:ids as bigint[])) as m(id) order by m.id`,
      { ids, fileName, mediaType, contentId, bytes } as never,
    );
  return ids;
}

/** Takes the mail for one attempt, for as long as the lease lasts; undefined when it is sent, not yet due or with somebody else. */
export async function leaseMail(
  db: Queryable,
  id: number,
  now: Date,
  leaseSeconds: number,
): Promise<WaitingMail | undefined> {
  return findRow<WaitingMail>(
    db,
    `update outbox set leased_until = cast(:now as timestamptz) + make_interval(secs => :leaseSeconds), attempts = attempts + 1
     where id = :id and state = 'waiting' and next_attempt_at <= :now and (leased_until is null or leased_until <= :now)
     returning id, event, kind, recipient, subject, html, plain_text as text, message_id as "messageId", attempts`,
    { id, now, leaseSeconds },
  );
}

/** Keeps a lease for as long as the attempt lasts. */
export async function updateMailLease(db: Queryable, id: number, now: Date, leaseSeconds: number): Promise<void> {
  await db('outbox')
    .where({ id, state: 'waiting' })
    .whereNotNull('leased_until')
    .update({ leased_until: new Date(now.getTime() + leaseSeconds * 1000) });
}

/** Takes every lease back. Only for a program that is the outbox's only sender, before it sends: who held them has ended. */
export async function updateMailLeasesEnded(db: Queryable): Promise<void> {
  await db('outbox').where({ state: 'waiting' }).whereNotNull('leased_until').update({ leased_until: null });
}

export async function updateMailSent(db: Queryable, id: number, at: Date): Promise<void> {
  await db('outbox')
    .where({ id, state: 'waiting' })
    .update({ state: 'sent', sent_at: at, leased_until: null, last_error: null });
}

/** Puts the mail off, or gives it up for a person to see when `nextAttemptAt` is null. */
export async function updateMailFailed(
  db: Queryable,
  id: number,
  error: string,
  nextAttemptAt: Date | null,
): Promise<void> {
  await db('outbox')
    .where({ id, state: 'waiting' })
    .update({
      last_error: error,
      leased_until: null,
      ...(nextAttemptAt === null ? { state: 'failed' } : { next_attempt_at: nextAttemptAt }),
    });
}

/** Ids of the mails that are due and with nobody. */
export async function listDueMailIds(db: Queryable, now: Date, limit: number): Promise<number[]> {
  const found = await rows<{ id: number }>(
    db,
    `select id from outbox where state = 'waiting' and next_attempt_at <= :now and (leased_until is null or leased_until <= :now)
     order by next_attempt_at, id limit :limit`,
    { now, limit },
  );
  return found.map((row) => row.id);
}

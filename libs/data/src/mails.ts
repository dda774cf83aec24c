import type { MailState } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface MailRow {
  id: number;
  plantId: number;
  kind: string;
  recipient: string;
  subject: string;
  state: MailState;
  createdAt: Date;
  sentAt: Date | null;
  attempts: number;
  nextAttemptAt: Date;
  lastError: string | null;
}

const COLUMNS = `o.id, o.plant_id as "plantId", o.kind, o.recipient, o.subject, o.state, o.created_at as "createdAt",
  o.sent_at as "sentAt", o.attempts, o.next_attempt_at as "nextAttemptAt", o.last_error as "lastError"`;

export interface MailFilter {
  plantId: number;
  state?: MailState;
  kind?: string;
}

const conditions = ({ state, kind }: MailFilter) =>
  ['o.plant_id = :plantId', state && 'o.state = :state', kind && 'o.kind = :kind'].filter(Boolean).join(' and ');

/** The plant's mails, newest first. */
export function listMails(
  db: Queryable,
  filter: MailFilter,
  page: { limit: number; offset: number },
): Promise<MailRow[]> {
  return rows<MailRow>(
    db,
    `select ${COLUMNS} from outbox o where ${conditions(filter)} order by o.created_at desc, o.id desc limit :limit offset :offset`,
    { ...filter, ...page },
  );
}

export async function getMailCount(db: Queryable, filter: MailFilter): Promise<number> {
  const sql = `select count(*) as total from outbox o where ${conditions(filter)}`;
  return (await findRow<{ total: number }>(db, sql, { ...filter }))?.total ?? 0;
}

/** How many mails of each kind are in each state. */
export function listMailCounts(
  db: Queryable,
  plantId: number,
): Promise<{ kind: string; state: MailState; count: number }[]> {
  return rows(
    db,
    `select kind, state, count(*) from outbox where plant_id = :plantId group by kind, state order by kind, state`,
    { plantId },
  );
}

export interface WholeMail extends MailRow {
  text: string;
  html: string;
}

/** A mail of a plant; one of no plant is nobody's to read. */
export function findMail(db: Queryable, id: number): Promise<WholeMail | undefined> {
  const sql = `select ${COLUMNS}, o.plain_text as text, o.html from outbox o where o.id = :id and o.plant_id is not null`;
  return findRow<WholeMail>(db, sql, { id });
}

export interface MailAttachmentRow {
  name: string;
  mediaType: string;
  contentId: string | null;
  bytes: number;
  /** Of what is shown inline only. */
  inlineBytes: Buffer | null;
}

export function listMailAttachments(db: Queryable, mailId: number): Promise<MailAttachmentRow[]> {
  return rows<MailAttachmentRow>(
    db,
    `select file_name as name, media_type as "mediaType", content_id as "contentId", length(bytes) as bytes,
       case when content_id is not null then bytes end as "inlineBytes"
     from outbox_attachments where outbox_id = :mailId order by id`,
    { mailId },
  );
}

/** Takes the mail for the transaction that sends it again; undefined when it is gone. */
export function lockMail(tx: Transaction, id: number): Promise<MailRow | undefined> {
  return findRow<MailRow>(tx, `select ${COLUMNS} from outbox o where o.id = :id for update`, { id });
}

/** Lets a mail that was given up be tried anew. */
export async function updateMailToWaiting(tx: Transaction, id: number, at: Date): Promise<void> {
  await tx('outbox')
    .where({ id, state: 'failed' })
    .update({ state: 'waiting', attempts: 0, next_attempt_at: at, leased_until: null });
}

/** Whether a copy of the mail waits to be sent. */
export async function hasWaitingCopy(db: Queryable, id: number): Promise<boolean> {
  const sql = `select 1 from outbox where state = 'waiting' and event like :event limit 1`;
  return (await findRow(db, sql, { event: `again-${id}-%` })) !== undefined;
}

/** Writes a mail that was sent anew, with its attachments, as an event of its own. The caller holds the old one (`lockMail`). */
export async function insertMailCopy(tx: Transaction, id: number, at: Date): Promise<number> {
  const [copy] = await rows<{ id: number }>(
    tx,
    `insert into outbox (plant_id, event, kind, recipient, subject, html, plain_text, message_id, next_attempt_at, created_at)
     select plant_id, 'again-' || id || '-' || (select count(*) + 1 from outbox a where a.event like 'again-' || o.id || '-%'), kind,
       recipient, subject, html, plain_text, '<' || gen_random_uuid() || '@ebbline>', :at, :at
     from outbox o where id = :id returning id`,
    { id, at },
  );
  await tx.raw(
    `insert into outbox_attachments (outbox_id, file_name, media_type, content_id, bytes)
     select :copyId, file_name, media_type, content_id, bytes from outbox_attachments where outbox_id = :id order by id`,
    { id, copyId: copy.id },
  );
  return copy.id;
}

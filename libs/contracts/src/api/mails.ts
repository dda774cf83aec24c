import type { Instant, Page } from './common';
import type { HistoryEntry } from './lots';

export const MAIL_STATES = ['waiting', 'sent', 'failed'] as const;
export type MailState = (typeof MAIL_STATES)[number];

/** What a mail of the outbox is about, in words; a kind that is not listed is shown as it is. */
export const OUTBOX_KIND_NAMES: Record<string, string> = {
  'held-lots': 'held lots',
  decision: 'decision',
  'hold-reminder': 'reminder of an old hold',
  'weekly-summary': 'weekly summary',
  invitation: 'invitation',
  'password-reset': 'new password',
};

/** Their link lets its holder in: nobody but the recipient reads it. */
export const PRIVATE_MAIL_KINDS: readonly string[] = ['invitation', 'password-reset', 'first-administrator'];

/** One row of GET plants/:id/mails, newest first. */
export interface MailListItem {
  id: number;
  kind: string;
  recipient: string;
  subject: string;
  state: MailState;
  createdAt: Instant;
  sentAt: Instant | null;
  attempts: number;
  /** Of a mail that waits. */
  nextAttemptAt: Instant | null;
  /** Why the last attempt did not succeed, as the mail server or the network said it. */
  lastError: string | null;
}

/** GET plants/:id/mails?state=&kind=&page=. */
export interface MailsView extends Page<MailListItem> {
  /** Of the whole plant, whatever the filters. */
  counts: Record<MailState, number>;
  /** Kinds that there are. */
  kinds: string[];
}

/** GET mails/:id. */
export interface MailView extends MailListItem {
  plantId: number;
  /** Null when `isPrivate`. Inline pictures stand in the HTML as data. */
  text: string | null;
  html: string | null;
  isPrivate: boolean;
  attachments: { name: string; mediaType: string; bytes: number; isInline: boolean }[];
  /** Whether it may be sent again now: not while it waits. */
  maySendAgain: boolean;
  history: HistoryEntry[];
}

/** POST mails/:id/send-again: the mail that is sent now; a new one where the old one had been sent. */
export interface MailSentAgain {
  id: number;
}

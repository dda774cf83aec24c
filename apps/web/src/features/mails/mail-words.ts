import { type MailListItem, type MailState, type MailsView, OUTBOX_KIND_NAMES } from '@app/contracts';
import { formatInstant } from '../../shared/time/plant-time';

export const STATE_WORDS: Record<MailState, string> = { waiting: 'waiting', sent: 'sent', failed: 'not sent' };

export const kindWords = (kind: string) => OUTBOX_KIND_NAMES[kind] ?? kind;

/** "3 wait, 1 could not be sent, 41 were sent." */
export function countsSentence({ waiting, failed, sent }: MailsView['counts']): string {
  if (waiting + failed + sent === 0) return 'No mail has been written yet.';
  const parts = [
    waiting > 0 && `${waiting} ${waiting === 1 ? 'waits' : 'wait'}`,
    failed > 0 && `${failed} could not be sent`,
    `${sent} ${sent === 1 ? 'was' : 'were'} sent`,
  ];
  return `${parts.filter((part) => part !== false).join(', ')}.`;
}

const attemptsWords = (attempts: number) => (attempts === 1 ? 'one attempt' : `${attempts} attempts`);

/** What became of a mail, as a sentence. */
export function mailFate(mail: MailListItem, timeZone: string): string {
  const at = (instant: string | null) => (instant === null ? '' : formatInstant(instant, timeZone, 'short'));
  const after = mail.attempts > 0 ? ` after ${attemptsWords(mail.attempts)}` : '';
  switch (mail.state) {
    case 'sent':
      return `Sent ${at(mail.sentAt)}${mail.attempts > 1 ? after : ''}.`;
    case 'waiting':
      return mail.lastError === null ? 'Waits to be sent.' : `Waits${after}; the next is at ${at(mail.nextAttemptAt)}.`;
    case 'failed':
      return `Given up${after}.`;
  }
}

/** "12 kB" */
export function sizeWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  return bytes < 999_500 ? `${Math.round(bytes / 1000)} kB` : `${(bytes / 1e6).toFixed(1)} MB`;
}

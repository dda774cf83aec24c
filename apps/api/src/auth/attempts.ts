import { type Database, type FailureRules, findBlockedUntil, upsertFailure } from '@app/data';
import { RetryLaterError } from '../platform/retry-later-error';

/** Refuses while one of the subjects has to wait. `what` begins the sentence: "Too many wrong passwords". */
export async function refuseBlocked(
  db: Database,
  {
    subjects,
    now,
    code,
    what,
    isSure = false,
  }: { subjects: string[]; now: Date; code: string; what: string; isSure?: boolean },
): Promise<void> {
  const until = await findBlockedUntil(db, subjects, now);
  if (until === undefined && !isSure) return;
  const seconds = until === undefined ? 1 : Math.max(1, Math.ceil((until.getTime() - now.getTime()) / 1000));
  throw new RetryLaterError(
    code,
    `${what}. Try again in ${seconds === 1 ? '1 second' : `${seconds} seconds`}.`,
    seconds,
  );
}

/** A few at once, then a wait of a minute that doubles to a quarter of an hour. A plant's people share an address. */
const RULES = { firstDelaySeconds: 60, longestDelaySeconds: 900, forgottenAfterSeconds: 3600 };
const MAIL_RULES: FailureRules = { ...RULES, allowed: 3 };
const ADDRESS_RULES: FailureRules = { ...RULES, allowed: 20 };

/** Counts a request for a mail against the mailbox and the place that asks, whether or not anybody has that mailbox. */
export async function countMailRequest(db: Database, email: string, address: string, now: Date): Promise<void> {
  const [mailbox, place] = [`reset:${email.toLowerCase()}`, `reset-from:${address}`];
  const wait = { subjects: [mailbox, place], now, code: 'too-many-requests', what: 'Too many mails were asked for' };
  await refuseBlocked(db, wait);
  const isCounted =
    (await upsertFailure(db, mailbox, now, MAIL_RULES)) && (await upsertFailure(db, place, now, ADDRESS_RULES));
  if (!isCounted) await refuseBlocked(db, { ...wait, isSure: true });
}

const linkWait = (address: string, now: Date) => ({
  subjects: [`link-from:${address}`],
  now,
  code: 'too-many-wrong-links',
  what: 'Too many links that do not work',
});

export const refuseLinkGuesser = (db: Database, address: string, now: Date) =>
  refuseBlocked(db, linkWait(address, now));

/** Counts a link that nobody was sent. */
export async function countUnknownLink(db: Database, address: string, now: Date): Promise<void> {
  await upsertFailure(db, linkWait(address, now).subjects[0], now, ADDRESS_RULES);
}

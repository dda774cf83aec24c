/**
 * The queues, their jobs and payloads. Payloads carry ids only; what is owed stands in the database (`owed_jobs`, `outbox`),
 * so that a queue may be lost with its process and is filled again from there.
 */
export const WORK_QUEUE = 'work';
export const MAIL_QUEUE = 'mail';

export const JOBS = {
  /** Read a stored workbook, stage its readings and report what was recognised. */
  readIntake: 'read-intake',
  /** Store a confirmed intake's readings, judge its channels, hold and mail. */
  scoreIntake: 'score-intake',
  /** Judge channels again after a break, an approval, a decision or an exclusion. */
  scoreChannels: 'score-channels',
  /** Judge channels again without an intake that was withdrawn. */
  rejudgeWithdrawn: 'rejudge-withdrawn',
  /** Find the settled verdicts that would be another one by an intake's readings. */
  compareSettled: 'compare-settled',
  /** Judge these again, as a person asked. */
  rejudgeSettled: 'rejudge-settled',
  /** Work out the default plan of a channel from its readings and propose it. */
  proposePlan: 'propose-plan',
  /** Freeze a plant's week as a summary and mail it. */
  weeklySummary: 'weekly-summary',
} as const;
export type JobName = (typeof JOBS)[keyof typeof JOBS];

/** Payload of a job on WORK_QUEUE: the row of `owed_jobs` that it does. */
export interface OwedJobPayload {
  owedJobId: number;
}

/** What a row of `owed_jobs` is about, by its name. */
export interface OwedJobSubject {
  'read-intake': { intakeId: number };
  'score-intake': { intakeId: number };
  /** `rejudgeFrom` (ISO): settled verdicts of lots that end later are looked at again too. */
  'score-channels': { channelIds: number[]; reason: string; rejudgeFrom: string | null };
  'rejudge-withdrawn': { intakeId: number };
  'compare-settled': { intakeId: number };
  'rejudge-settled': { intakeId: number };
  'propose-plan': { planId: number };
  /** `askedBy`: the person who wants a new version; null when it is due and made unless the week has one. */
  'weekly-summary': { plantId: number; weekStartsOn: string; isSent: boolean; askedBy: number | null };
}

/** Payload of the one job on MAIL_QUEUE. */
export interface MailJobPayload {
  outboxId: number;
}
export const SEND_MAIL_JOB = 'send-mail';

/** The repeated job on WORK_QUEUE that owes the summaries that are due: a Monday 06:00 of any zone is met within minutes. */
export const DUE_SUMMARIES_JOB = 'due-summaries';
export const DUE_SUMMARIES_EVERY_MS = 300_000;

/**
 * Attempts, with 2, 6, 14, 30, … s between them: some eight minutes in all, over all queues and restarts; then a person must look.
 * Job ids are `owed-<id>` and `mail-<id>`.
 */
export const JOB_OPTIONS = { attempts: 8, backoff: { type: 'exponential', delay: 2_000 } } as const;

/** `read` waits for a person to confirm; `done` and `failed` are the end. */
export const PROGRESS_STAGES = ['reading', 'read', 'storing', 'judging', 'done', 'failed'] as const;

/** One line of GET intakes/:id/events. */
export interface IntakeProgress {
  intakeId: number;
  stage: (typeof PROGRESS_STAGES)[number];
  rowsRead: number;
  channelsScored: number;
  channelsTotal: number;
  /** Whole sentence for the person who waits. */
  sentence: string;
}

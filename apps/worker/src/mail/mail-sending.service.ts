import { Inject, Injectable, Logger, type OnApplicationShutdown } from '@nestjs/common';
import {
  type Database,
  leaseMail,
  listOutboxAttachments,
  updateMailFailed,
  updateMailLease,
  updateMailSent,
  type WaitingMail,
} from '@app/data';
import { createMailTransport, MailSendError, type MailTransport } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE } from '@app/platform';

/** Kept up while an attempt lasts: a mail whose sender was ended is sent again by another one this much later. */
const LEASE_SECONDS = 20;
const KEEP_UP_MS = 6_000;
const FIRST_DELAY_SECONDS = 5;
const LONGEST_DELAY_SECONDS = 3600;
/** About a day of trying. */
const MAX_ATTEMPTS = 30;

export type SendOutcome = { sent: true } | { sent: false; reason: string };

/** Sends one mail of the outbox. It may be sent again after a crash, always under the same Message-ID. */
@Injectable()
export class MailSendingService implements OnApplicationShutdown {
  private readonly logger = new Logger(MailSendingService.name);
  private readonly transport: MailTransport;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    @Inject(CONFIG) config: Config,
  ) {
    this.transport = createMailTransport(config.smtpUrl, config.mailFrom);
  }

  async send(outboxId: number): Promise<SendOutcome> {
    const mail = await leaseMail(this.database, outboxId, this.clock.now(), LEASE_SECONDS);
    if (!mail) return { sent: false, reason: 'sent already, not yet due, or with another worker' };
    try {
      await this.transmit(mail);
    } catch (error) {
      return this.putOff(mail.id, mail.attempts, error);
    }
    await updateMailSent(this.database, mail.id, this.clock.now());
    return { sent: true };
  }

  private async transmit(mail: WaitingMail): Promise<void> {
    const keepUp = setInterval(() => {
      updateMailLease(this.database, mail.id, this.clock.now(), LEASE_SECONDS).catch((error: unknown) =>
        this.logger.warn(`Could not keep up the lease of mail ${mail.id}: ${String(error)}`),
      );
    }, KEEP_UP_MS);
    try {
      const { messageId, recipient, subject, html, text } = mail;
      const attachments = (await listOutboxAttachments(this.database, mail.id)).map((attachment) => ({
        filename: attachment.fileName,
        content: attachment.bytes,
        contentType: attachment.mediaType,
        ...(attachment.contentId !== null && { cid: attachment.contentId }),
      }));
      await this.transport.send({ messageId, to: recipient, subject, html, text, attachments });
    } finally {
      clearInterval(keepUp);
    }
  }

  private async putOff(id: number, attempts: number, error: unknown): Promise<SendOutcome> {
    const isPermanent = error instanceof MailSendError && error.isPermanent;
    const delaySeconds = Math.min(LONGEST_DELAY_SECONDS, FIRST_DELAY_SECONDS * 2 ** Math.min(attempts - 1, 20));
    const next =
      isPermanent || attempts >= MAX_ATTEMPTS ? null : new Date(this.clock.now().getTime() + delaySeconds * 1000);
    const reason = error instanceof Error ? error.message : String(error);
    await updateMailFailed(this.database, id, reason, next);
    this.logger.warn(`Mail ${id} was not accepted (attempt ${attempts}): ${reason}`);
    return { sent: false, reason };
  }

  onApplicationShutdown(): void {
    this.transport.close();
  }
}

import { setTimeout as sleep } from 'node:timers/promises';
import { Inject, Injectable } from '@nestjs/common';
import { type Database, findPersonForSignIn, insertAccountEntry, insertMails, listMemberships } from '@app/data';
import { passwordResetMail, zonedText } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher } from '@app/platform';
import { countMailRequest } from './attempts';
import { issueLink } from './issue-link';

/** The answer comes no sooner, so that its time does not tell whether somebody has the address. */
const LEAST_MILLISECONDS = 250;

/** Mails a link to whoever forgot their password. */
@Injectable()
export class PasswordResetService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    @Inject(CONFIG) private readonly config: Config,
    private readonly dispatcher: Dispatcher,
  ) {}

  async request(email: string, address: string): Promise<void> {
    await countMailRequest(this.database, email, address, this.clock.now());
    const [mailIds] = await Promise.all([this.write(email, address), sleep(LEAST_MILLISECONDS)]);
    void this.dispatcher.mails(mailIds);
  }

  /**
   * Nothing for nobody, for who is disabled, and for who has not accepted an invitation (who invited can send it again). Who has no role
   * at any plant, such as the first administrator before the first plant, reads the time in UTC.
   */
  private async write(email: string, address: string): Promise<number[]> {
    const person = await findPersonForSignIn(this.database, email);
    if (!person || person.passwordHash === null) return [];
    const plant = (await listMemberships(this.database, person.id)).at(0);
    const at = this.clock.now();
    return this.database.transaction(async (tx) => {
      const { publicUrl } = this.config;
      const link = await issueLink(tx, { personId: person.id, purpose: 'password_reset', at, publicUrl });
      const timeZone = plant?.timeZone ?? 'UTC';
      const until = `${zonedText(link.expiresAt, timeZone)} (${timeZone})`;
      const mail = passwordResetMail({ name: person.name, url: link.url, until });
      await insertAccountEntry(tx, person.id, {
        at,
        actor: null,
        action: 'request-password-reset',
        sentence: `A link to choose a new password was asked for and mailed to ${person.name}.`,
        address,
      });
      const event = `password-reset-${link.id}`;
      const mails = [{ event, kind: 'password-reset', recipient: person.email, ...mail }];
      return insertMails(tx, plant?.plantId ?? null, mails, at);
    });
  }
}

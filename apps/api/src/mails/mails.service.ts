import { Inject, Injectable } from '@nestjs/common';
import {
  DomainError,
  MAIL_STATES,
  type MailSentAgain,
  type MailState,
  type MailsView,
  type MailView,
} from '@app/contracts';
import {
  type Database,
  findMail,
  findPlant,
  getMailCount,
  hasWaitingCopy,
  insertAuditEntry,
  insertMailCopy,
  listHistory,
  listMailAttachments,
  listMailCounts,
  listMails,
  lockMail,
  type MailRow,
  type Person,
  type Transaction,
  updateMailToWaiting,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import { notFound } from '../access/not-found';
import { toHistory } from '../lots/lot-view';
import { limitsOf } from '../platform/paging';
import type { MailsQuery } from './dto/mails-query.dto';
import { toMailListItem, toMailView } from './mail-view';

/** What a plant's mails came to, for its administrator. */
@Injectable()
export class MailsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async list(person: Person, plantId: number, query: MailsQuery): Promise<MailsView> {
    await this.access.requireThing(person.id, await findPlant(this.database, plantId), 'set_up_plant');
    const filter = { plantId, state: query.state, kind: query.kind };
    const [total, mails, found] = await Promise.all([
      getMailCount(this.database, filter),
      listMails(this.database, filter, limitsOf(query)),
      listMailCounts(this.database, plantId),
    ]);
    const countOf = (state: MailState) =>
      found.filter((row) => row.state === state).reduce((sum, { count }) => sum + count, 0);
    return {
      items: mails.map(toMailListItem),
      total,
      page: query.page,
      pageSize: query.pageSize,
      counts: Object.fromEntries(MAIL_STATES.map((state) => [state, countOf(state)])) as MailsView['counts'],
      kinds: [...new Set(found.map(({ kind }) => kind))],
    };
  }

  async find(person: Person, id: number): Promise<MailView> {
    const found = await findMail(this.database, id);
    const { thing: mail } = await this.access.requireThing(person.id, found, 'set_up_plant');
    const [attachments, history] = await Promise.all([
      listMailAttachments(this.database, id),
      listHistory(this.database, [{ kind: 'mail', id }]),
    ]);
    return toMailView(mail, attachments, toHistory(history));
  }

  /** A mail that was given up is tried anew; of one that was sent, a copy goes out. */
  async sendAgain(person: Person, id: number): Promise<MailSentAgain> {
    const found = await findMail(this.database, id);
    await this.access.requireThing(person.id, found, 'set_up_plant');
    const now = this.clock.now();
    const sentId = await this.database.transaction(async (tx) => {
      const mail = await lockMail(tx, id);
      if (!mail) throw notFound();
      if (mail.state === 'waiting' || (await hasWaitingCopy(tx, id)))
        throw new DomainError('conflict', 'mail-waiting', 'This mail waits already: it is sent as soon as it can be.');
      const sentId = await this.write(tx, mail, now);
      await insertAuditEntry(tx, {
        plantId: mail.plantId,
        at: now,
        actor: person,
        action: 'send-mail-again',
        thingKind: 'mail',
        thingId: id,
        sentence: `${person.name} had the mail “${mail.subject}” to ${mail.recipient} sent again`,
        before: { state: mail.state, attempts: mail.attempts, lastError: mail.lastError },
        after: { state: 'waiting', mailId: sentId },
      });
      return sentId;
    });
    await this.dispatcher.mails([sentId]);
    return { id: sentId };
  }

  private async write(tx: Transaction, mail: MailRow, at: Date): Promise<number> {
    if (mail.state === 'sent') return insertMailCopy(tx, mail.id, at);
    await updateMailToWaiting(tx, mail.id, at);
    return mail.id;
  }
}

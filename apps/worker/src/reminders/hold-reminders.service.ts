import { Inject, Injectable, Logger, type OnApplicationBootstrap, type OnApplicationShutdown } from '@nestjs/common';
import { REMINDER_AUDIENCES, type ReminderAudience } from '@app/contracts';
import {
  type Database,
  insertAuditEntry,
  insertHoldReminders,
  insertMails,
  listPlantsToRemind,
  listReminderFacts,
  listReminderRecipients,
  type ReminderFact,
  type ReminderPlant,
  type Transaction,
} from '@app/data';
import { holdReminderMail, type OldHoldFacts, zonedText } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher } from '@app/platform';
import { RunningWork } from '../owed/running-work';

const EVERY_MS = 60_000;

const AUDIENCE_WORDS: Record<ReminderAudience, string> = {
  quality_manager: 'the quality managers',
  director: 'the plant director',
};

/** Tells people of open holds that have grown old, once an audience. Any number of workers may do it at once. */
@Injectable()
export class HoldRemindersService implements OnApplicationBootstrap, OnApplicationShutdown {
  private readonly logger = new Logger(HoldRemindersService.name);
  private timer?: NodeJS.Timeout;
  private isLooking = false;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly dispatcher: Dispatcher,
    private readonly running: RunningWork,
  ) {}

  onApplicationBootstrap(): void {
    this.timer = setInterval(() => void this.running.track(this.look()), EVERY_MS);
    void this.running.track(this.look());
  }

  onApplicationShutdown(): void {
    clearInterval(this.timer);
  }

  /** Reminds whoever is due now. What fails is said, and looked for again by the next look. */
  async look(): Promise<void> {
    if (this.isLooking || this.running.isStopping) return;
    this.isLooking = true;
    try {
      for (const audience of REMINDER_AUDIENCES)
        for (const plant of await listPlantsToRemind(this.database, audience, this.clock.now()))
          await this.dispatcher.mails(await this.remind(plant, audience));
    } catch (error) {
      this.logger.warn(`Looking for old holds failed, trying again in ${EVERY_MS / 1000} s: ${String(error)}`);
    } finally {
      this.isLooking = false;
    }
  }

  /** Without anybody to tell, nothing is recorded: whoever comes later is told. */
  private remind(plant: ReminderPlant, audience: ReminderAudience): Promise<number[]> {
    const now = this.clock.now();
    return this.database.transaction(async (tx) => {
      const recipients = await listReminderRecipients(tx, plant.plantId, audience);
      if (recipients.length === 0) return [];
      const holdIds = await insertHoldReminders(tx, plant.plantId, audience, now);
      if (holdIds.length === 0) return [];
      const facts = await listReminderFacts(tx, holdIds);
      for (const fact of facts) await this.audit(tx, plant, audience, fact, now);
      const mail = holdReminderMail({
        ...plant,
        audience,
        holds: facts.map((fact) => this.holdFacts(fact, plant.timeZone, now)),
      });
      const event = `hold-reminder-${audience}-${Math.min(...holdIds)}`;
      const mails = recipients.map(({ email }) => ({ event, kind: 'hold-reminder', recipient: email, ...mail }));
      return insertMails(tx, plant.plantId, mails, now);
    });
  }

  private holdFacts(fact: ReminderFact, timeZone: string, now: Date): OldHoldFacts {
    return {
      ...fact,
      ageMs: now.getTime() - fact.openedAt.getTime(),
      openedAt: zonedText(fact.openedAt, timeZone),
      remindedAt: fact.managersRemindedAt && zonedText(fact.managersRemindedAt, timeZone),
      url: `${this.config.publicUrl}/holds/${fact.holdId}`,
    };
  }

  private audit(tx: Transaction, plant: ReminderPlant, audience: ReminderAudience, fact: ReminderFact, at: Date) {
    return insertAuditEntry(tx, {
      plantId: plant.plantId,
      at,
      actor: null,
      action: 'remind-hold',
      thingKind: 'hold',
      thingId: fact.holdId,
      sentence: `Ebbline reminded ${AUDIENCE_WORDS[audience]} of lot ${fact.lotNumber}, whose hold is older than ${plant.hours} h`,
      after: { audience, hours: plant.hours },
    });
  }
}

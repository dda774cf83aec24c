import { Inject, Injectable } from '@nestjs/common';
import { type BreakView, DomainError, JOBS } from '@app/contracts';
import {
  type Database,
  findChannelPlace,
  findPlanInForce,
  insertAuditEntry,
  insertBreak,
  insertOwedJob,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import type { BreakDto } from './dto/break.dto';

const KIND_WORDS = {
  adjustment: 'an adjustment',
  gauge_change: 'a gauge change',
  process_change: 'a process change',
} as const;

/** Declares that a channel's baseline starts afresh at an instant. */
@Injectable()
export class BreaksService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
  ) {}

  /** Lots that the old baseline reached across the instant are judged again, settled or not; both verdicts are kept. */
  async declare(person: Person, channelId: number, body: BreakDto): Promise<BreakView> {
    const found = await findChannelPlace(this.database, channelId);
    const { thing: channel } = await this.access.requireThing(person.id, found, 'declare_break');
    const now = this.clock.now();
    const at = new Date(body.at);
    if (at > now)
      throw new DomainError('invalid', 'break-in-future', 'A break cannot lie ahead of now.', [
        { pointer: '/at', code: 'break-in-future', detail: 'A break cannot lie ahead of now.' },
      ]);
    const { id, owedJobId } = await this.database.transaction(async (tx) => {
      const id = await insertBreak(tx, {
        ...body,
        plantId: channel.plantId,
        channelId,
        at,
        declaredBy: person.id,
        declaredAt: now,
      });
      await insertAuditEntry(tx, {
        plantId: channel.plantId,
        at: now,
        actor: person,
        action: 'declare-break',
        thingKind: 'channel',
        thingId: channelId,
        sentence: `${person.name} declared ${KIND_WORDS[body.kind]} on ${channel.name} of ${channel.lineName}: ${body.reason}`,
        after: { breakId: id, at: at.toISOString(), kind: body.kind, reason: body.reason },
      });
      const plan = await findPlanInForce(tx, channelId);
      const reachMs = plan ? (plan.parameters.effectivePeriodSeconds / 2) * 1000 : 0;
      const owedJobId = await insertOwedJob(tx, {
        plantId: channel.plantId,
        name: JOBS.scoreChannels,
        subject: {
          channelIds: [channelId],
          reason: `a break on ${channel.name}`,
          rejudgeFrom: new Date(at.getTime() - reachMs).toISOString(),
        },
        at: now,
      });
      return { id, owedJobId };
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return { id, at: at.toISOString(), kind: body.kind, reason: body.reason, by: person.name };
  }
}

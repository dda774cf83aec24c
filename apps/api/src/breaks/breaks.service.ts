import { Inject, Injectable } from '@nestjs/common';
import { type BreakView, DomainError } from '@app/contracts';
import { type Database, findChannelPlace, type Person } from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import { declareBreak } from './declare-break';
import type { BreakDto } from './dto/break.dto';

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
    const { kind, reason } = body;
    const { id, owedJobId } = await this.database.transaction((tx) =>
      declareBreak(tx, { channel, break: { at, kind, reason }, person, now }),
    );
    await this.dispatcher.owedJobs([owedJobId]);
    return { id, at: at.toISOString(), kind, reason, by: person.name };
  }
}

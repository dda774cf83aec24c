import { Inject, Injectable } from '@nestjs/common';
import type { ChannelView, Page } from '@app/contracts';
import { type Database, findChannel, findLine, listChannels, type Person } from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { toChannelView } from './channel-view';

@Injectable()
export class ChannelsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async list(person: Person, lineId: number): Promise<Page<ChannelView>> {
    await this.access.requireThing(person.id, await findLine(this.database, lineId), 'read');
    return onePage((await listChannels(this.database, lineId, this.clock.now())).map(toChannelView));
  }

  async find(person: Person, id: number): Promise<ChannelView> {
    const channel = await findChannel(this.database, id, this.clock.now());
    return toChannelView((await this.access.requireThing(person.id, channel, 'read')).thing);
  }
}

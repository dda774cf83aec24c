import { Inject, Injectable } from '@nestjs/common';
import type { ChannelBody, ChannelGaugeBody, ChannelSetUpView, NewChannelBody, Page } from '@app/contracts';
import { type Database, findChannelSetUp, type ChannelSetUpRow, listChannelSetUps, type Person } from '@app/data';
import { DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { addChannel, changeChannel, channelView } from './channels';
import { changeGaugeOfChannel } from './served-since';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpChannelsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
    private readonly dispatcher: Dispatcher,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<ChannelSetUpView>> {
    await this.access.require(person.id, plantId, 'read');
    return onePage((await listChannelSetUps(this.database, plantId)).map(channelView));
  }

  async add(person: Person, plantId: number, body: NewChannelBody): Promise<ChannelSetUpView> {
    return this.view(await this.writes.inPlant(person, plantId, (tx, change) => addChannel(tx, change, body)));
  }

  async change(person: Person, id: number, body: ChannelBody): Promise<ChannelSetUpView> {
    const channel = await findChannelSetUp(this.database, id);
    await this.writes.ofThing(person, channel, (tx, change) => changeChannel(tx, change, id, body));
    return this.view(id);
  }

  async changeGauge(person: Person, id: number, body: ChannelGaugeBody): Promise<ChannelSetUpView> {
    const channel = await findChannelSetUp(this.database, id);
    const owed = await this.writes.ofThing(person, channel, (tx, change) => changeGaugeOfChannel(tx, change, id, body));
    await this.dispatcher.owedJobs(owed);
    return this.view(id);
  }

  private async view(id: number): Promise<ChannelSetUpView> {
    return channelView((await findChannelSetUp(this.database, id)) as ChannelSetUpRow);
  }
}

import { Inject, Injectable } from '@nestjs/common';
import type { GaugeBody, GaugeSetUpView, NewGaugeBody, Page } from '@app/contracts';
import { type Database, findGaugeSetUp, type GaugeSetUpRow, listGaugeSetUps, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { addGauge, changeGauge, gaugeView } from './gauges';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpGaugesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<GaugeSetUpView>> {
    await this.access.require(person.id, plantId, 'read');
    return onePage((await listGaugeSetUps(this.database, plantId)).map(gaugeView));
  }

  async add(person: Person, plantId: number, body: NewGaugeBody): Promise<GaugeSetUpView> {
    return this.view(await this.writes.inPlant(person, plantId, (tx, change) => addGauge(tx, change, body)));
  }

  async change(person: Person, id: number, body: GaugeBody): Promise<GaugeSetUpView> {
    const gauge = await findGaugeSetUp(this.database, id);
    await this.writes.ofThing(person, gauge, (tx, change) => changeGauge(tx, change, id, body));
    return this.view(id);
  }

  private async view(id: number): Promise<GaugeSetUpView> {
    return gaugeView((await findGaugeSetUp(this.database, id)) as GaugeSetUpRow);
  }
}

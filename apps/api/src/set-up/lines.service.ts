import { Inject, Injectable } from '@nestjs/common';
import type { LineBody, LineSetUpView, NewLineBody, Page } from '@app/contracts';
import { type Database, findLineSetUp, type LineSetUpRow, listLineSetUps, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { addLine, changeLine, lineView } from './lines';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpLinesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<LineSetUpView>> {
    await this.access.require(person.id, plantId, 'read');
    return onePage((await listLineSetUps(this.database, plantId)).map(lineView));
  }

  async add(person: Person, plantId: number, body: NewLineBody): Promise<LineSetUpView> {
    return this.view(await this.writes.inPlant(person, plantId, (tx, change) => addLine(tx, change, body)));
  }

  async change(person: Person, id: number, body: LineBody): Promise<LineSetUpView> {
    const line = await findLineSetUp(this.database, id);
    await this.writes.ofThing(person, line, (tx, change) => changeLine(tx, change, id, body));
    return this.view(id);
  }

  private async view(id: number): Promise<LineSetUpView> {
    return lineView((await findLineSetUp(this.database, id)) as LineSetUpRow);
  }
}

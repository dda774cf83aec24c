import { Inject, Injectable } from '@nestjs/common';
import type { ShiftCalendarBody, ShiftCalendarsView } from '@app/contracts';
import { type Database, listShifts, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { SetUpWrites } from './set-up-writes.service';
import { calendarsView, changeShifts } from './shifts';

@Injectable()
export class SetUpShiftsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async list(person: Person, plantId: number): Promise<ShiftCalendarsView> {
    await this.access.require(person.id, plantId, 'read');
    return calendarsView(await listShifts(this.database, plantId));
  }

  async change(person: Person, plantId: number, body: ShiftCalendarBody): Promise<ShiftCalendarsView> {
    await this.writes.inPlant(person, plantId, (tx, change) => changeShifts(tx, change, body));
    return this.list(person, plantId);
  }
}

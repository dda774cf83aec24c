import { Inject, Injectable } from '@nestjs/common';
import type { Permission } from '@app/contracts';
import { type Database, type Person, type Transaction, withConflicts } from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import type { Change } from './change';
import { SET_UP_CONFLICTS } from './conflicts';

/** What every write to a set-up goes through: the right to it, one transaction, and refusals of the database in words. */
@Injectable()
export class SetUpWrites {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async inPlant<T>(
    person: Person,
    plantId: number,
    work: (tx: Transaction, change: Change) => Promise<T>,
    permission: Permission = 'set_up_plant',
  ): Promise<T> {
    await this.access.require(person.id, plantId, permission);
    const change = { plantId, person, at: this.clock.now() };
    return withConflicts(SET_UP_CONFLICTS, () => this.database.transaction((tx) => work(tx, change)));
  }

  /** The same in the plant of a thing; one that is not there is answered as a foreign plant's. */
  async ofThing<T>(
    person: Person,
    thing: { plantId: number } | undefined,
    work: (tx: Transaction, change: Change) => Promise<T>,
    permission: Permission = 'set_up_plant',
  ): Promise<T> {
    const { thing: found } = await this.access.requireThing(person.id, thing, permission);
    return this.inPlant(person, found.plantId, work, permission);
  }
}

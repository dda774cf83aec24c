import { Inject, Injectable } from '@nestjs/common';
import { type Database, findPlant, type Person, type PlantRow } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';

/** Whether somebody may look after the people of a plant. */
@Injectable()
export class PlantAdministration {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
  ) {}

  async require(person: Person, plantId: number): Promise<PlantRow> {
    const found = await findPlant(this.database, plantId);
    return (await this.access.requireThing(person.id, found, 'set_up_plant')).thing;
  }
}

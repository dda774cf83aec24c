import { Inject, Injectable } from '@nestjs/common';
import type { Permission } from '@app/contracts';
import { type Database, findLine, findPlant, listPlants } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from './access.service';

export interface Scope {
  plantIds: number[];
  timeZone: string;
}

/** Which plants a list may show: the line's, the plant asked for, or every plant where the person is somebody. */
@Injectable()
export class ScopeService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
  ) {}

  async of(personId: number, asked: { plantId?: number; lineId?: number }, permission: Permission): Promise<Scope> {
    if (asked.lineId !== undefined) {
      const found = await findLine(this.database, asked.lineId);
      const { thing } = await this.access.requireThing(personId, found, permission);
      // A line of another plant than the one asked for has nothing in it.
      const isElsewhere = asked.plantId !== undefined && asked.plantId !== thing.plantId;
      return { plantIds: isElsewhere ? [] : [thing.plantId], timeZone: thing.timeZone };
    }
    if (asked.plantId !== undefined) {
      const found = await findPlant(this.database, asked.plantId);
      const { thing } = await this.access.requireThing(personId, found, permission);
      return { plantIds: [thing.plantId], timeZone: thing.timeZone };
    }
    const plants = await listPlants(this.database, personId);
    return { plantIds: plants.map((plant) => plant.id), timeZone: plants[0]?.timeZone ?? 'UTC' };
  }
}

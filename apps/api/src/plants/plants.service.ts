import { Inject, Injectable } from '@nestjs/common';
import type { LineView, Page, PlantView, StripView } from '@app/contracts';
import {
  type Database,
  findLine,
  findPlant,
  listLines,
  listPlants,
  listStripLots,
  mapLotMarks,
  type Person,
} from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { stripShifts } from './strip-shifts';

const STRIP_SHIFTS = 14;

@Injectable()
export class PlantsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
  ) {}

  async listPlants(person: Person): Promise<Page<PlantView>> {
    return onePage(await listPlants(this.database, person.id));
  }

  async listLines(person: Person, plantId: number): Promise<Page<LineView>> {
    await this.access.requireThing(person.id, await findPlant(this.database, plantId), 'read');
    return onePage(await listLines(this.database, plantId));
  }

  async strip(person: Person, lineId: number): Promise<StripView> {
    const { thing: line } = await this.access.requireThing(person.id, await findLine(this.database, lineId), 'read');
    const [lots, lines] = await Promise.all([
      listStripLots(this.database, lineId, STRIP_SHIFTS),
      listLines(this.database, line.plantId),
    ]);
    const marks = await mapLotMarks(
      this.database,
      lots.map((lot) => lot.id),
    );
    return {
      line: { id: line.id, name: line.name },
      plant: { id: line.plantId, name: line.plantName, timeZone: line.timeZone },
      shifts: stripShifts(lots, marks),
      otherLines: lines.filter((other) => other.id !== lineId),
    };
  }
}

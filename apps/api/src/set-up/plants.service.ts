import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type NewPlantBody, type PlantSetUpBody, type PlantSetUpView } from '@app/contracts';
import {
  type Database,
  findPlantSetUp,
  isAdministrator,
  isInstallationAdministrator,
  type Person,
  type PlantSetUpRow,
  withConflicts,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { SET_UP_CONFLICTS } from './conflicts';
import { addPlant, changePlant, plantSetUpView } from './plants';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpPlantsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async get(person: Person, id: number): Promise<PlantSetUpView> {
    await this.access.require(person.id, id, 'read');
    return plantSetUpView((await findPlantSetUp(this.database, id)) as PlantSetUpRow);
  }

  /** An administrator of any plant may, and whoever was made the installation's first one. */
  async add(person: Person, body: NewPlantBody): Promise<PlantSetUpView> {
    const mayAdd =
      (await isAdministrator(this.database, person.id)) ||
      (await isInstallationAdministrator(this.database, person.id));
    if (!mayAdd)
      throw new DomainError(
        'forbidden',
        'forbidden',
        'You may not do that: it takes the role of administrator at a plant.',
      );
    const at = this.clock.now();
    const id = await withConflicts(SET_UP_CONFLICTS, () =>
      this.database.transaction((tx) => addPlant(tx, { person, at }, body)),
    );
    return this.get(person, id);
  }

  async change(person: Person, id: number, body: PlantSetUpBody): Promise<PlantSetUpView> {
    await this.writes.inPlant(person, id, (tx, change) => changePlant(tx, change, body));
    return this.get(person, id);
  }
}

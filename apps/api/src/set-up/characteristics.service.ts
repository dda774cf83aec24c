import { Inject, Injectable } from '@nestjs/common';
import type { CharacteristicBody, CharacteristicSetUpView, NewCharacteristicBody, Page } from '@app/contracts';
import {
  type Database,
  findCharacteristicSetUp,
  type CharacteristicSetUpRow,
  listCharacteristicSetUps,
  type Person,
} from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { addCharacteristic, changeCharacteristic, characteristicView } from './characteristics';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpCharacteristicsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<CharacteristicSetUpView>> {
    await this.access.require(person.id, plantId, 'read');
    return onePage((await listCharacteristicSetUps(this.database, plantId)).map(characteristicView));
  }

  async add(person: Person, plantId: number, body: NewCharacteristicBody): Promise<CharacteristicSetUpView> {
    return this.view(await this.writes.inPlant(person, plantId, (tx, change) => addCharacteristic(tx, change, body)));
  }

  async change(person: Person, id: number, body: CharacteristicBody): Promise<CharacteristicSetUpView> {
    const characteristic = await findCharacteristicSetUp(this.database, id);
    await this.writes.ofThing(person, characteristic, (tx, change) => changeCharacteristic(tx, change, id, body));
    return this.view(id);
  }

  private async view(id: number): Promise<CharacteristicSetUpView> {
    return characteristicView((await findCharacteristicSetUp(this.database, id)) as CharacteristicSetUpRow);
  }
}

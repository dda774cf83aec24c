import { Inject, Injectable } from '@nestjs/common';
import { LINK_PURPOSES, type Page, type PersonView, type RolesRequest } from '@app/contracts';
import {
  type Database,
  findPlantPerson,
  insertAccountEntry,
  insertAuditEntry,
  listPlantPeople,
  listPlantsOfPerson,
  lockPlants,
  type Person,
  type PlantPerson,
  replaceRoles,
  type Transaction,
  updateApiTokensRevoked,
  updatePersonDisabled,
  updatePersonTokensRevoked,
  updateSessionsRevoked,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { notFound } from '../access/not-found';
import { onePage } from '../platform/paging';
import { conflict, requireAnotherAdministrator, requireLines, requireWholePerson } from './people-rules';
import { PlantAdministration } from './plant-administration.service';
import { personView, rolesText } from './person-view';

/** Who is somebody at a plant, as what, and whether they may sign in. */
@Injectable()
export class PeopleService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly administration: PlantAdministration,
  ) {}

  async list(administrator: Person, plantId: number): Promise<Page<PersonView>> {
    await this.administration.require(administrator, plantId);
    return onePage((await listPlantPeople(this.database, plantId)).map(personView));
  }

  /** Roles and lines take effect with the next request: they are read at each. Without any role the person leaves the plant. */
  async change(administrator: Person, plantId: number, personId: number, request: RolesRequest): Promise<PersonView> {
    await this.administration.require(administrator, plantId);
    const person = await this.database.transaction((tx) =>
      this.changeWithin(tx, { administrator, plantId, at: this.clock.now() }, personId, request),
    );
    return personView(person);
  }

  /** The same in a transaction of the caller, who has seen to the right to it. */
  async changeWithin(
    tx: Transaction,
    { administrator, plantId, at }: { administrator: Person; plantId: number; at: Date },
    personId: number,
    { roles, lineIds }: RolesRequest,
  ): Promise<PlantPerson> {
    await lockPlants(tx, [plantId]);
    const before = await this.requireHere(tx, plantId, personId);
    const lines = roles.length === 0 ? [] : await requireLines(tx, plantId, lineIds);
    if (before.roles.includes('administrator') && !roles.includes('administrator'))
      await requireAnotherAdministrator(tx, plantId, before);
    const after = { roles, lineIds: lines.map((line) => line.id) };
    await replaceRoles(tx, plantId, personId, after);
    if (roles.length === 0 && !before.hasPassword) await updatePersonTokensRevoked(tx, personId, ['invitation'], at);
    if (roles.length === 0) await updateApiTokensRevoked(tx, personId, at, plantId);
    const what =
      roles.length === 0
        ? `took ${before.name} out of the plant`
        : `made ${before.name} ${rolesText(roles)}${lines.length === 0 ? '' : ` on ${lines.map((line) => line.name).join(', ')}`}`;
    await insertAuditEntry(tx, {
      plantId,
      at,
      actor: administrator,
      action: 'change-roles',
      thingKind: 'person',
      thingId: personId,
      sentence: `${administrator.name} ${what}.`,
      before: { roles: before.roles, lineIds: before.lineIds },
      after,
    });
    return (await findPlantPerson(tx, plantId, personId)) ?? { ...before, ...after };
  }

  /** Ends every session, every link and every API token; the person's entries stay. */
  disable(administrator: Person, plantId: number, personId: number): Promise<PersonView> {
    return this.setDisabled(administrator, plantId, personId, async (tx, person, plantIds, at) => {
      if (person.id === administrator.id)
        throw conflict('is-yourself', 'You cannot disable yourself: another administrator can.');
      if (person.disabledAt !== null) return null;
      for (const id of plantIds) await requireAnotherAdministrator(tx, id, person);
      await updatePersonDisabled(tx, personId, at);
      await updateSessionsRevoked(tx, personId, at);
      await updatePersonTokensRevoked(tx, personId, LINK_PURPOSES, at);
      await updateApiTokensRevoked(tx, personId, at);
      return { action: 'disable-person', word: 'disabled' };
    });
  }

  enable(administrator: Person, plantId: number, personId: number): Promise<PersonView> {
    return this.setDisabled(administrator, plantId, personId, async (tx, person) => {
      if (person.disabledAt === null) return null;
      await updatePersonDisabled(tx, personId, null);
      return { action: 'enable-person', word: 'enabled' };
    });
  }

  private async setDisabled(
    administrator: Person,
    plantId: number,
    personId: number,
    set: (
      tx: Transaction,
      person: PlantPerson,
      plantIds: number[],
      at: Date,
    ) => Promise<{ action: string; word: string } | null>,
  ): Promise<PersonView> {
    await this.administration.require(administrator, plantId);
    return this.database.transaction(async (tx) => {
      const before = await this.requireHere(tx, plantId, personId);
      const plants = await listPlantsOfPerson(tx, personId, administrator.id);
      requireWholePerson(before, plants);
      const plantIds = plants.map((plant) => plant.plantId);
      await lockPlants(tx, plantIds);
      const person = await this.requireHere(tx, plantId, personId);
      const at = this.clock.now();
      const done = await set(tx, person, plantIds, at);
      if (done === null) return personView(person);
      const after = await this.requireHere(tx, plantId, personId);
      await insertAccountEntry(tx, personId, {
        at,
        actor: administrator,
        action: done.action,
        sentence: `${administrator.name} ${done.word} ${person.name}.`,
        before: { state: personView(person).state },
        after: { state: personView(after).state },
      });
      return personView(after);
    });
  }

  private async requireHere(tx: Transaction, plantId: number, personId: number): Promise<PlantPerson> {
    const person = await findPlantPerson(tx, plantId, personId);
    if (!person) throw notFound();
    return person;
  }
}

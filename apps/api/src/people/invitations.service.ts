import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type InvitationRequest, type PersonView } from '@app/contracts';
import {
  type Database,
  findPersonByEmail,
  findPlantPerson,
  insertAuditEntry,
  insertMails,
  insertPerson,
  type KnownPerson,
  listLineNames,
  listPlantsOfPerson,
  lockPlants,
  type Person,
  type PlantPerson,
  type PlantRow,
  replaceRoles,
  type Transaction,
  updatePersonDisabled,
  withConflicts,
} from '@app/data';
import { invitationMail, zonedText } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher } from '@app/platform';
import { notFound } from '../access/not-found';
import { issueLink } from '../auth/issue-link';
import { conflict, requireLines } from './people-rules';
import { personView, rolesText } from './person-view';
import { PlantAdministration } from './plant-administration.service';

/** Brings people to a plant, by mail. */
@Injectable()
export class InvitationsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    @Inject(CONFIG) private readonly config: Config,
    private readonly administration: PlantAdministration,
    private readonly dispatcher: Dispatcher,
  ) {}

  /** Somebody who is known already from another plant gets the roles here and a mail that says so, under their own name. */
  async invite(administrator: Person, plantId: number, request: InvitationRequest): Promise<PersonView> {
    const plant = await this.administration.require(administrator, plantId);
    return this.dispatched((tx, at) => this.inviteWithin(tx, { administrator, plant, at }, request));
  }

  /** The same in a transaction of the caller, who has seen to the right to it and dispatches the mails once it stands. */
  async inviteWithin(
    tx: Transaction,
    { administrator, plant, at }: { administrator: Person; plant: PlantRow; at: Date },
    request: InvitationRequest,
  ): Promise<{ person: PlantPerson; mailIds: number[] }> {
    const taken = {
      code: 'invited-meanwhile',
      detail: 'Somebody invited this address just now. Look at the list again.',
    };
    return withConflicts({ people_email_key: taken }, async () => {
      await lockPlants(tx, [plant.id]);
      await requireLines(tx, plant.id, request.lineIds);
      const personId = await this.personOf(tx, plant.id, request, at);
      await replaceRoles(tx, plant.id, personId, request);
      return this.write(tx, { administrator, plant, personId, at, action: 'invite-person', verb: 'invited' });
    });
  }

  /** Sends a new link; the earlier one ends. */
  async inviteAgain(administrator: Person, plantId: number, personId: number): Promise<PersonView> {
    const plant = await this.administration.require(administrator, plantId);
    return this.dispatched(async (tx, at) => {
      const person = await findPlantPerson(tx, plantId, personId);
      if (!person) throw notFound();
      if (person.disabledAt !== null)
        throw conflict('person-disabled', `${person.name} is disabled. Enable them first.`);
      if (person.hasPassword)
        throw conflict('already-accepted', `${person.name} has a password already and can sign in.`);
      return this.write(tx, { administrator, plant, personId, at, action: 'invite-again', verb: 'invited again' });
    });
  }

  private async dispatched(
    work: (tx: Transaction, at: Date) => Promise<{ person: PlantPerson; mailIds: number[] }>,
  ): Promise<PersonView> {
    const { person, mailIds } = await this.database.transaction((tx) => work(tx, this.clock.now()));
    await this.dispatcher.mails(mailIds);
    return personView(person);
  }

  private async personOf(tx: Transaction, plantId: number, request: InvitationRequest, at: Date): Promise<number> {
    const known = await findPersonByEmail(tx, request.email);
    if (!known) return insertPerson(tx, { email: request.email, name: request.name, createdAt: at });
    if (await findPlantPerson(tx, plantId, known.id)) throw alreadyHere(known);
    if (known.disabledAt === null) return known.id;
    const plants = await listPlantsOfPerson(tx, known.id, known.id);
    if (plants.length > 0)
      throw conflict('person-disabled', `${known.name} is disabled at present, so no roles can be given.`);
    await updatePersonDisabled(tx, known.id, null);
    return known.id;
  }

  private async write(
    tx: Transaction,
    what: { administrator: Person; plant: PlantRow; personId: number; at: Date; action: string; verb: string },
  ): Promise<{ person: PlantPerson; mailIds: number[] }> {
    const { administrator, plant, personId, at } = what;
    const before = (await findPlantPerson(tx, plant.id, personId)) as PlantPerson;
    const { publicUrl } = this.config;
    const link = before.hasPassword ? null : await issueLink(tx, { personId, purpose: 'invitation', at, publicUrl });
    const person = (await findPlantPerson(tx, plant.id, personId)) as PlantPerson;
    const lines = await listLineNames(tx, plant.id, person.lineIds);
    const mail = invitationMail({
      name: person.name,
      plantName: plant.name,
      by: administrator.name,
      roles: rolesText(person.roles),
      lines: lines.map((line) => line.name),
      url: link?.url ?? `${publicUrl}/`,
      until: link && `${zonedText(link.expiresAt, plant.timeZone)} (${plant.timeZone})`,
    });
    await insertAuditEntry(tx, {
      plantId: plant.id,
      at,
      actor: administrator,
      action: what.action,
      thingKind: 'person',
      thingId: personId,
      sentence: `${administrator.name} ${what.verb} ${person.name} (${person.email}) as ${rolesText(person.roles)}.`,
      after: { roles: person.roles, lineIds: person.lineIds, linkEndsAt: link?.expiresAt.toISOString() ?? null },
    });
    const event = link ? `invitation-${link.id}` : `role-${plant.id}-${personId}-${at.getTime()}`;
    const mails = [{ event, kind: 'invitation', recipient: person.email, ...mail }];
    return { person, mailIds: await insertMails(tx, plant.id, mails, at) };
  }
}

function alreadyHere(person: KnownPerson): DomainError {
  const detail = `${person.name} is at this plant already. Change the roles in the list.`;
  return new DomainError('conflict', 'already-here', detail, [{ pointer: '/email', code: 'already-here', detail }]);
}

import { Inject, Injectable } from '@nestjs/common';
import { type DecisionRequest, decisionRights, DomainError, SIGNATURE_MEANINGS } from '@app/contracts';
import {
  type Database,
  findHoldForDecision,
  getLinePlace,
  type HoldForDecision,
  insertAuditEntry,
  insertDecision,
  insertMails,
  insertSetAside,
  listChannelIdsOfLot,
  listLineRecipients,
  lockHold,
  type Person,
  type Transaction,
  updateInputsChanged,
} from '@app/data';
import { decisionMail, zonedText } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';

/** The line lead's word that a lot stands apart, and the decision that ends its hold. */
@Injectable()
export class DecisionsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    @Inject(CONFIG) private readonly config: Config,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async setAside(person: Person, holdId: number, place: string | null): Promise<void> {
    await this.access.requireThing(person.id, await findHoldForDecision(this.database, holdId), 'set_aside');
    await this.database.transaction(async (tx) => {
      const hold = (await lockHold(tx, holdId)) as HoldForDecision;
      if (hold.state !== 'open') throw endedAlready(hold);
      if (hold.isSetAside)
        throw new DomainError(
          'conflict',
          'already-set-aside',
          `Somebody confirmed already that lot ${hold.lotNumber} stands apart.`,
        );
      const at = this.clock.now();
      await insertSetAside(tx, { holdId, plantId: hold.plantId, place, by: person.id, at });
      await insertAuditEntry(tx, {
        plantId: hold.plantId,
        at,
        actor: person,
        action: 'set-aside',
        thingKind: 'hold',
        thingId: holdId,
        sentence: `${person.name} confirmed that lot ${hold.lotNumber} is set aside${place ? `: ${place}` : ''}.`,
        after: { setAside: true, place },
      });
    });
  }

  /** Who may is checked by `mayDecide`; the password by the caller before. Returns nothing: the hold is read again. */
  async decide(person: Person, holdId: number, request: DecisionRequest): Promise<void> {
    const mailIds = await this.database.transaction(async (tx) => {
      const hold = (await lockHold(tx, holdId)) as HoldForDecision;
      refuseStale(hold, request.evidenceVersion);
      return this.record(tx, person, hold, request);
    });
    await this.dispatcher.mails(mailIds);
  }

  /** Throws unless the person may give this disposition now. */
  async requireRight(person: Person, holdId: number, request: DecisionRequest): Promise<void> {
    const found = await findHoldForDecision(this.database, holdId);
    const { thing: hold, roles } = await this.access.requireThing(person.id, found, 'read');
    const { dispositions, why } = decisionRights({
      roles,
      engineerMayRelease: hold.engineerMayRelease,
      isForControlLimitsAlone: hold.isForControlLimitsAlone,
      hasConfirmedItsIntake: hold.confirmerIds.includes(person.id),
    });
    if (!dispositions.includes(request.disposition))
      throw new DomainError('forbidden', 'may-not-decide', why ?? 'A quality manager decides this.');
    refuseStale(hold, request.evidenceVersion);
  }

  private async record(
    tx: Transaction,
    person: Person,
    hold: HoldForDecision,
    request: DecisionRequest,
  ): Promise<number[]> {
    const at = this.clock.now();
    const meaning = SIGNATURE_MEANINGS[request.disposition];
    const note = request.note ? request.note : null;
    const decisionId = await insertDecision(tx, hold, { ...request, note, by: person, meaning, at });
    await updateInputsChanged(tx, await listChannelIdsOfLot(tx, hold.lotId));
    await insertAuditEntry(tx, {
      plantId: hold.plantId,
      at,
      actor: person,
      action: request.disposition,
      thingKind: 'hold',
      thingId: hold.id,
      sentence: `${person.name} ${meaning} lot ${hold.lotNumber}: ${request.reason}`,
      before: { state: 'open', evidenceVersion: hold.evidenceVersion },
      after: { state: 'decided', disposition: request.disposition, reason: request.reason, note, decisionId, meaning },
    });
    const place = await getLinePlace(tx, hold.lineId);
    const mail = decisionMail({
      plantName: place.plantName,
      lineName: place.lineName,
      lotNumber: hold.lotNumber,
      disposition: request.disposition,
      reason: request.reason,
      note,
      by: person.name,
      at: zonedText(at, place.timeZone),
      quantity: hold.quantity,
      quantityUnit: hold.quantityUnit,
      isSetAside: hold.isSetAside,
      causes: hold.sentences,
      url: `${this.config.publicUrl}/holds/${hold.id}`,
    });
    const recipients = await listLineRecipients(tx, hold.lineId, 'decisions');
    const mails = recipients.map(({ email }) => ({
      event: `decision-${decisionId}`,
      kind: 'decision',
      recipient: email,
      ...mail,
    }));
    return insertMails(tx, hold.plantId, mails, at);
  }
}

const endedAlready = ({ lotNumber, state }: HoldForDecision) =>
  state === 'withdrawn'
    ? new DomainError(
        'conflict',
        'hold-withdrawn',
        `The hold of lot ${lotNumber} ended meanwhile, undecided: the intake that led to it was withdrawn.`,
      )
    : new DomainError('conflict', 'already-decided', `Lot ${lotNumber} was decided meanwhile. Read the hold again.`);

function refuseStale(hold: HoldForDecision, evidenceVersion: number): void {
  if (hold.state !== 'open') throw endedAlready(hold);
  if (hold.evidenceVersion !== evidenceVersion)
    throw new DomainError(
      'conflict',
      'evidence-changed',
      `The evidence on lot ${hold.lotNumber} changed since you read it. Read it again, then decide.`,
    );
}

import { Inject, Injectable } from '@nestjs/common';
import {
  getLinePlace,
  type HeldLot,
  type HoldMailFact,
  insertMails,
  listHoldMailFacts,
  listLineRecipients,
  type Transaction,
} from '@app/data';
import { type HeldLotFacts, heldLotsMail, zonedText } from '@app/mail';
import { CONFIG, type Config } from '@app/platform';

/** Writes the mails about held lots: one a recipient for all that one scoring held on a line. */
@Injectable()
export class HeldLotsMailService {
  constructor(@Inject(CONFIG) private readonly config: Config) {}

  /** Returns the outbox ids to send once the transaction has committed. `event` makes each mail once. */
  async write(tx: Transaction, held: HeldLot[], event: string, occasion: string, at: Date): Promise<number[]> {
    const ids: number[] = [];
    for (const lineId of new Set(held.map((lot) => lot.lineId)))
      ids.push(
        ...(await this.writeForLine(
          tx,
          lineId,
          held.filter((lot) => lot.lineId === lineId),
          event,
          occasion,
          at,
        )),
      );
    return ids;
  }

  private async writeForLine(
    tx: Transaction,
    lineId: number,
    held: HeldLot[],
    event: string,
    occasion: string,
    at: Date,
  ): Promise<number[]> {
    const place = await getLinePlace(tx, lineId);
    const facts = await listHoldMailFacts(
      tx,
      held.map((lot) => lot.holdId),
    );
    const lots = held
      .map((lot) =>
        this.lotFacts(
          lot,
          facts.filter((fact) => fact.holdId === lot.holdId),
          place.timeZone,
        ),
      )
      .filter((lot) => lot.causes.length > 0);
    const mail = heldLotsMail({ plantName: place.plantName, lineName: place.lineName, occasion, lots });
    const recipients = await listLineRecipients(tx, lineId, 'held_lots');
    const key = `${event}-line-${lineId}`;
    const mails = recipients.map(({ email }) => ({ event: key, kind: 'held-lots', recipient: email, ...mail }));
    return insertMails(tx, place.plantId, mails, at);
  }

  private lotFacts(lot: HeldLot, facts: HoldMailFact[], timeZone: string): HeldLotFacts {
    const [first] = facts;
    return {
      lotNumber: lot.lotNumber,
      product: first.product,
      span: `${zonedText(first.lotStartsAt, timeZone)} to ${zonedText(first.lotEndsAt, timeZone)}`,
      isLate: lot.isLate,
      url: `${this.config.publicUrl}/holds/${lot.holdId}`,
      causes: facts.map((fact) => ({ ...fact, wouldConstantHold: fact.constantState === 'outside_control_limits' })),
    };
  }
}

import { holdReason } from '@app/contracts';
import { type HeldLot, insertAuditEntry, type Transaction } from '@app/data';

/** The audit entries of opened holds and added causes. */
export async function auditHolds(tx: Transaction, held: HeldLot[], at: Date): Promise<void> {
  for (const lot of held) {
    const reason = holdReason(
      lot.lotNumber,
      lot.causes.map((cause) => cause.sentence),
    );
    await insertAuditEntry(tx, {
      plantId: lot.plantId,
      at,
      actor: null,
      action: lot.isNew ? 'hold' : 'add-cause',
      thingKind: 'hold',
      thingId: lot.holdId,
      sentence: lot.isNew
        ? `Ebbline held the lot${lot.isLate ? ' late' : ''}: ${reason}`
        : `Ebbline added to the hold: ${reason}`,
      after: { state: 'open', causes: lot.causes },
    });
  }
}

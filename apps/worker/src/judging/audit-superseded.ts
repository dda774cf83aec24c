import { insertAuditEntry, type IntakeRow, type SupersededPlace, type Transaction } from '@app/data';

/** Says in the history of each lot which of its readings a corrected workbook superseded, and when that was after a decision. */
export async function auditSuperseded(
  tx: Transaction,
  intake: IntakeRow,
  places: SupersededPlace[],
  at: Date,
): Promise<void> {
  for (const { lotId, lotNumber, channelName, readings, meanBefore, meanAfter, isDecided } of places)
    await insertAuditEntry(tx, {
      plantId: intake.plantId,
      at,
      actor: null,
      action: 'supersede',
      thingKind: 'lot',
      thingId: lotId,
      sentence:
        `${readings} ${readings === 1 ? 'reading' : 'readings'} of lot ${lotNumber} on ${channelName} ${readings === 1 ? 'was' : 'were'} superseded by the intake of ${intake.fileName}, ` +
        `which ${intake.confirmedByName} confirmed${isDecided ? '. The lot had been decided on what was stored before' : ''}.`,
      before: { mean: meanBefore },
      after: { mean: meanAfter, intakeId: intake.id },
    });
}

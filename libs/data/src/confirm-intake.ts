import { type ConfirmIntakeRequest, JOBS, type RememberedLayout, type SheetGrid } from '@app/contracts';
import { insertAuditEntry } from './audit';
import { refuseOutdatedComparison } from './compare-intake';
import type { Transaction } from './database';
import { type IntakeRow, updateIntakeConfirmed } from './intakes';
import { listLayouts, upsertLayouts } from './layouts';
import { insertOwedJob } from './owed-jobs';
import type { Person } from './people';

/**
 * Confirms a workbook that was read: says so, remembers its layouts with what was answered about them, and owes its scoring.
 * @param intake locked by the caller, who has seen that it may be confirmed
 * @throws DomainError comparison-changed when anything changed on the line since it was compared (see refreshComparison)
 * @returns the owed job's id
 */
export async function confirmIntake(
  tx: Transaction,
  { intake, person, at, differing = 'keep' }: { intake: IntakeRow; person: Person; at: Date } & ConfirmIntakeRequest,
): Promise<number> {
  await refuseOutdatedComparison(tx, intake);
  await updateIntakeConfirmed(tx, intake.id, { by: person.id, at, differing });
  await rememberLayouts(tx, intake, person, at);
  await insertAuditEntry(tx, {
    plantId: intake.plantId,
    at,
    actor: person,
    action: 'confirm',
    thingKind: 'intake',
    thingId: intake.id,
    sentence: intake.confirmsItself
      ? `The intake of ${intake.fileName} for ${intake.lineName} confirmed itself, as ${person.name} had asked: its layout is known and nothing was left to say.`
      : `${person.name} confirmed the intake of ${intake.fileName} for ${intake.lineName}.${differing === 'supersede' ? ' Where its readings differ from stored ones, they take their place.' : ''}`,
    before: { state: intake.state },
    after: { state: 'queued', differing },
  });
  const subject = { intakeId: intake.id };
  return insertOwedJob(tx, { plantId: intake.plantId, name: JOBS.scoreIntake, subject, at });
}

/** What was answered about a sheet is remembered for its header; what was remembered before stays where nothing was answered anew. */
async function rememberLayouts(tx: Transaction, intake: IntakeRow, person: Person, at: Date): Promise<void> {
  const { grids = [] } = intake.report as { grids?: SheetGrid[] };
  const { sheets = {} } = intake.answers;
  const known = new Set((await listLayouts(tx, intake.lineId)).map(({ fingerprint }) => fingerprint));
  const layouts = grids.flatMap(({ fingerprint, sheet, headerRow }): RememberedLayout[] => {
    if (fingerprint === null || headerRow === null) return [];
    const answers = Object.hasOwn(sheets, sheet) ? sheets[sheet] : undefined;
    if (answers === undefined && known.has(fingerprint)) return [];
    return [{ fingerprint, sheetName: sheet, answers: answers ?? {} }];
  });
  await upsertLayouts(tx, intake, layouts, { personId: person.id, at });
}

import type { IntakeListItem, IntakeProblem, IntakeView } from '@app/contracts';
import { holdReason, notScoredSentence } from '@app/contracts';
import type { IntakeNotes, IntakeRow } from '@app/data';
import type { WorkbookReport } from '@app/workbook';

export type StoredReport = Omit<WorkbookReport, 'problems'>;

interface Parts {
  intake: IntakeRow;
  sameFile: IntakeRow | undefined;
  problems: IntakeProblem[];
  channels: Map<number, { name: string; unit: string }>;
  /** Of the first rows, in their order. */
  shifts: (string | null)[];
  isWithdrawable: boolean;
  outcome:
    (IntakeNotes & { lotsScored: number; held: { holdId: number; lotNumber: string; sentences: string[] }[] }) | null;
}

/** Whether a person may confirm it now: it was read, nothing blocks, and there is something to store. */
export function isConfirmable(intake: IntakeRow): boolean {
  const report = intake.report as StoredReport | null;
  return intake.state === 'needs_attention' && report !== null && isReady(report);
}

/** Nothing blocks, nothing is left to answer, and there is something to store. */
function isReady({ isBlocked, questions = [], readingsParsed }: StoredReport): boolean {
  return !isBlocked && questions.length === 0 && readingsParsed > 0;
}

export function intakeView({
  intake,
  sameFile,
  problems,
  channels,
  shifts,
  isWithdrawable,
  outcome,
}: Parts): IntakeView {
  const report = intake.report as StoredReport | null;
  const nameOf = (channelId: number | null) => (channelId === null ? undefined : channels.get(channelId)?.name);
  return {
    id: intake.id,
    state: intake.state,
    line: { id: intake.lineId, name: intake.lineName },
    plantId: intake.plantId,
    fileName: intake.fileName,
    byteCount: intake.byteCount,
    sha256: intake.sha256.toString('hex'),
    receivedAt: intake.receivedAt.toISOString(),
    receivedBy: intake.receivedByName,
    confirmedAt: intake.confirmedAt?.toISOString() ?? null,
    confirmedBy: intake.confirmedByName,
    scoredAt: intake.scoredAt?.toISOString() ?? null,
    sameFileAs: sameFile
      ? { id: sameFile.id, receivedAt: sameFile.receivedAt.toISOString(), receivedBy: sameFile.receivedByName }
      : null,
    failure: intake.failure,
    layout: report?.layout ?? null,
    columns: (report?.columns ?? []).map(({ channelId, ...column }) => {
      const name = nameOf(channelId);
      return { ...column, channel: channelId !== null && name !== undefined ? { id: channelId, name } : null };
    }),
    firstRows: (report?.firstRows ?? []).map((reading, index) => ({
      sheet: reading.sheet,
      row: reading.row,
      at: new Date(reading.at).toISOString(),
      shift: shifts[index] ?? null,
      lot: reading.lot,
      product: reading.product,
      quantity: reading.quantity,
      serial: reading.serial,
      position: reading.position,
      channelName: nameOf(reading.channelId) ?? '',
      unit: channels.get(reading.channelId)?.unit ?? '',
      value: reading.value,
      censoring: reading.censoring,
    })),
    lots: (report?.lots ?? []).map((lot) => ({
      number: lot.number,
      product: lot.product,
      readings: lot.readings,
      firstAt: new Date(lot.firstAt).toISOString(),
      lastAt: new Date(lot.lastAt).toISOString(),
    })),
    rowsRead: intake.rowsRead,
    rowsUsed: intake.rowsUsed,
    rowsAlreadyThere: intake.rowsAlreadyThere,
    rowsNotUsed: intake.rowsNotUsed,
    readingsStored: intake.readingsStored,
    readingsAlreadyThere: intake.readingsAlreadyThere,
    problems,
    problemCounts: (report?.problemCounts ?? []).map(({ code, severity, count }) => ({ code, severity, count })),
    questions: report?.questions ?? [],
    grids: report?.grids ?? [],
    text: report?.text ?? null,
    answers: intake.answers,
    comparison: intake.comparison,
    rowsSuperseding: intake.rowsSuperseding,
    withdrawal: withdrawalOf(intake),
    isWithdrawable,
    isConfirmable: isConfirmable(intake),
    outcome: outcome && {
      lotsScored: outcome.lotsScored,
      lotsHeld: outcome.held.map(({ holdId, lotNumber, sentences }) => ({
        holdId,
        lotNumber,
        sentence: holdReason(lotNumber, sentences),
      })),
      notScored: outcome.notScored.map(({ channelId, channelName, reason, lots }) => ({
        channel: { id: channelId, name: channelName },
        reason,
        sentence: notScoredSentence(reason),
        lots,
      })),
      beforeFirstPlan: outcome.beforeFirstPlan,
    },
  };
}

function withdrawalOf({ withdrawnAt, withdrawnByName, withdrawalReason }: IntakeRow): IntakeView['withdrawal'] {
  if (withdrawnAt === null) return null;
  return { at: withdrawnAt.toISOString(), by: withdrawnByName ?? '', reason: withdrawalReason ?? '' };
}

export function intakeListItem(intake: IntakeRow): IntakeListItem {
  return {
    id: intake.id,
    state: intake.state,
    fileName: intake.fileName,
    receivedAt: intake.receivedAt.toISOString(),
    receivedBy: intake.receivedByName,
    rowsRead: intake.rowsRead,
    rowsUsed: intake.rowsUsed,
    rowsNotUsed: intake.rowsNotUsed,
  };
}

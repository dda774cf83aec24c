import type { HistoryEntry, LotListItem, LotMark, LotView, VerdictView } from '@app/contracts';
import type { LotHoldRow, LotListRow, LotRow } from '@app/data';

const common = (row: LotRow | LotListRow, mark: LotMark) => ({
  id: row.id,
  number: row.number,
  line: { id: row.lineId, name: row.lineName },
  product: row.product,
  quantity: row.quantity,
  quantityUnit: row.quantityUnit,
  startsAt: row.startsAt.toISOString(),
  endsAt: row.endsAt.toISOString(),
  mark,
  disposition: mark.disposition,
});

export function toLotListItem(row: LotListRow, mark: LotMark): LotListItem {
  return {
    ...common(row, mark),
    farthest:
      row.farthestChannelId === null
        ? null
        : { channelId: row.farthestChannelId, channelName: row.farthestChannelName!, score: row.farthestScore! },
    hold:
      row.holdId === null ? null : { id: row.holdId, state: row.holdState!, openedAt: row.holdOpenedAt!.toISOString() },
  };
}

export function toLotView(
  row: LotRow,
  mark: LotMark,
  verdicts: VerdictView[],
  holds: LotHoldRow[],
  history: HistoryEntry[],
): LotView {
  const [newest] = holds;
  return {
    ...common(row, mark),
    plantId: row.plantId,
    hold: newest ? { id: newest.id, state: newest.state, openedAt: newest.openedAt.toISOString() } : null,
    verdicts,
    holds: holds.map((hold) => ({ id: hold.id, state: hold.state, openedAt: hold.openedAt.toISOString() })),
    history,
  };
}

/** Entries of the audit trail as a thing's history; what the program did itself has nobody's name. */
export function toHistory(
  entries: { at: Date; actorId: number | null; actorName: string; sentence: string }[],
): HistoryEntry[] {
  return entries.map(({ at, actorId, actorName, sentence }) => ({
    at: at.toISOString(),
    by: actorId === null ? null : actorName,
    sentence,
  }));
}

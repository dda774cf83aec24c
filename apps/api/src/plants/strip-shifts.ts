import type { LotMark, StripView } from '@app/contracts';
import type { StripLotRow } from '@app/data';

/** Lots in order of their shifts as shifts with their lots. */
export function stripShifts(lots: StripLotRow[], marks: Map<number, LotMark>): StripView['shifts'] {
  const shifts: StripView['shifts'] = [];
  for (const lot of lots) {
    const startsAt = lot.shiftStartsAt.toISOString();
    let shift = shifts.at(-1);
    if (shift?.startsAt !== startsAt || shift.name !== lot.shiftName) {
      shift = { name: lot.shiftName, startsAt, endsAt: lot.shiftEndsAt.toISOString(), lots: [] };
      shifts.push(shift);
    }
    shift.lots.push({
      id: lot.id,
      number: lot.number,
      startsAt: lot.startsAt.toISOString(),
      endsAt: lot.endsAt.toISOString(),
      mark: marks.get(lot.id)!,
    });
  }
  return shifts;
}

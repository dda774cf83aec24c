import { DateTime, IANAZone } from 'luxon';

/** Offsets from UTC change on the quarter hour, if at all. */
const QUARTER_HOUR = 900;

/** The plant's wall clock. */
export interface WallClock {
  /** Offset from UTC at an instant (s), s. */
  offsetAt: (at: number) => number;
  /** The wall-clock time of an instant as Excel keeps one: a Date whose UTC fields are the plant's hours and minutes. */
  excelDateAt: (at: number) => Date;
  /** ISO 8601 with the offset, which tells the hour that occurs twice in autumn apart. */
  isoTextAt: (at: number) => string;
  /** Whether the clocks go back between two instants, so that wall-clock times alone are not enough. */
  goesBackBetween: (from: number, to: number) => boolean;
}

export function wallClockOf(timeZone: string): WallClock {
  const zone = IANAZone.create(timeZone);
  const known = new Map<number, number>();
  const offsetAt = (at: number): number => {
    const block = Math.floor(at / QUARTER_HOUR);
    let offset = known.get(block);
    if (offset === undefined) {
      offset = zone.offset(block * QUARTER_HOUR * 1000) * 60;
      known.set(block, offset);
    }
    return offset;
  };
  return {
    offsetAt,
    excelDateAt: (at) => new Date((at + offsetAt(at)) * 1000),
    isoTextAt: (at) => DateTime.fromSeconds(at, { zone }).toISO({ suppressMilliseconds: true }) ?? '',
    goesBackBetween: (from, to) => {
      for (let at = from; at + QUARTER_HOUR <= to; at += QUARTER_HOUR) {
        if (offsetAt(at + QUARTER_HOUR) < offsetAt(at)) return true;
      }
      return offsetAt(to) < offsetAt(from);
    },
  };
}

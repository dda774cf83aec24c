import { IANAZone } from 'luxon';

const DAY = 86_400_000;
const MINUTE = 60_000;

/** Turns wall clocks of one zone into instants. Days without a change of offset cost one look into a map. */
export class ZoneClock {
  private readonly zone: IANAZone;
  /** Offset in minutes of a day far from any change, null near one. */
  private readonly days = new Map<number, number | null>();

  /** @throws RangeError when `timeZone` is no IANA zone */
  constructor(timeZone: string) {
    this.zone = IANAZone.create(timeZone);
    if (!this.zone.isValid) throw new RangeError(`"${timeZone}" is no IANA time zone.`);
  }

  /**
   * The instants at which the zone's clocks show a wall clock: one as a rule, none when the clocks jump over it,
   * two (the earlier first) when they show it twice.
   *
   * @param localMs the wall clock in milliseconds, as if it were UTC
   * @returns epoch milliseconds, ascending
   */
  instantsOf(localMs: number): number[] {
    const day = Math.floor(localMs / DAY);
    let offset = this.days.get(day);
    if (offset === undefined) {
      const before = this.zone.offset((day - 2) * DAY);
      offset = before === this.zone.offset((day + 3) * DAY) ? before : null;
      this.days.set(day, offset);
    }
    return offset === null ? this.instantsNearChange(localMs) : [localMs - offset * MINUTE];
  }

  private instantsNearChange(localMs: number): number[] {
    const offsets = new Set([this.zone.offset(localMs - DAY), this.zone.offset(localMs + DAY)]);
    return [...offsets]
      .map((offset) => ({ at: localMs - offset * MINUTE, offset }))
      .filter(({ at, offset }) => this.zone.offset(at) === offset)
      .map(({ at }) => at)
      .sort((a, b) => a - b);
  }
}

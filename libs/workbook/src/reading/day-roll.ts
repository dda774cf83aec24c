const DAY = 86_400_000;
const HALF_DAY = DAY / 2;
/** Under a shift's date, a sheet that begins before this time of day begins after midnight. */
const SMALL_HOURS = 5 * 3_600_000;

/** Follows times of day without a date over midnight: each is taken on the day on which it is nearest to the row before. */
export class ClockRoll {
  private previous: number | null = null;

  /**
   * @param dayMs midnight of the day on which the rows begin, as if it were UTC
   * @param isShiftDate it is the day on which a night shift began, so that a first time before noon belongs to the next
   */
  constructor(
    private readonly dayMs: number,
    private readonly isShiftDate: boolean,
  ) {}

  /** @returns the wall clock with its date, in milliseconds as if it were UTC */
  next(clockMs: number): number {
    if (this.previous === null) {
      this.previous = this.dayMs + clockMs + (this.isShiftDate && clockMs < HALF_DAY ? DAY : 0);
      return this.previous;
    }
    const step = clockMs - (((this.previous % DAY) + DAY) % DAY);
    this.previous += step > HALF_DAY ? step - DAY : step < -HALF_DAY ? step + DAY : step;
    return this.previous;
  }
}

/** Tells, row by row, whether a time belongs to the day after its date, if the dates are those on which shifts began. */
export class ShiftDateRoll {
  /** The row's time belongs to the day after its date. */
  isNextDay = false;
  /** The rows show it: under one date, the time stepped back by more than twelve hours. */
  hasStepped = false;
  private dayMs: number | null = null;
  private clockMs = 0;

  /** Takes the next row's date and time of day. */
  next(dayMs: number, clockMs: number): void {
    if (dayMs !== this.dayMs) {
      this.hasStepped = false;
      this.isNextDay = clockMs < SMALL_HOURS;
    } else if (this.clockMs - clockMs > HALF_DAY) {
      this.hasStepped = true;
      this.isNextDay = true;
    } else if (clockMs - this.clockMs > HALF_DAY) {
      this.hasStepped = false;
      this.isNextDay = false;
    }
    this.dayMs = dayMs;
    this.clockMs = clockMs;
  }
}

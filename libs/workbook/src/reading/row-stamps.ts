import type { LayoutAnswers, WorkbookAnswers } from '../answers';
import type { SheetRow } from '../container/sheet-rows';
import { ClockRoll, ShiftDateRoll } from './day-roll';
import type { Findings } from './findings';
import type { Questions } from './questions';
import { RowOrder } from './row-order';
import type { SheetLayout } from './sheet-layout';
import { parseStamp, type DateHabits, type ParsedStamp } from './stamps';
import { cellText } from './texts';
import { TimeQuestions } from './time-questions';
import { ZoneClock } from './zone-clock';

const DAY = 86_400_000;
/** A plant's clocks may be a little ahead of the server's. */
const AHEAD_TOLERANCE = 10 * 60_000;

export type RowStamp = { at: number } | { code: string; why: string; column?: number };

export interface RowStampsParts {
  dateSystem: 1900 | 1904;
  zone: ZoneClock;
  now: number;
  findings: Findings;
  questions: Questions;
  /** What a person said about the workbook beyond its layouts. */
  answers: WorkbookAnswers;
}

/** What the rows of one series need of the rows before them. */
interface Series {
  order: RowOrder;
  shiftDate: ShiftDateRoll;
  clock: ClockRoll | null;
}

/** Reads the instants of one sheet's rows, and remembers what of the rows before it needs. */
export class RowStamps {
  private readonly series = new Map<number, Series>();
  private readonly habits = new Map<number, DateHabits>();
  private readonly zone: ZoneClock;
  private readonly asks = new TimeQuestions();
  private rows = 0;
  private rowsAtMidnight = 0;
  private hasSaidDay = false;

  constructor(
    private readonly layout: SheetLayout,
    private readonly answers: LayoutAnswers,
    private readonly parts: RowStampsParts,
  ) {
    this.zone = answers.timeZone === undefined ? parts.zone : new ZoneClock(answers.timeZone);
  }

  /** Looks in which order the sheet's first rows have day and month, before they are read. */
  learn(rows: readonly SheetRow[]): void {
    const { time, date } = this.layout;
    for (const { column } of [time, date].filter((one) => one !== undefined))
      for (const row of rows)
        if (row.cells[column]?.kind === 'text')
          parseStamp(row.cells[column], this.parts.dateSystem, this.habitsOf(column));
  }

  /** @param series the rows' order is followed per series: the channel in the long layout, 0 in the wide */
  read(row: SheetRow, series: number): RowStamp {
    const { time, date, clock } = this.layout;
    const column = (time ?? date ?? clock)?.column;
    if (column === undefined) return { code: 'time-missing', why: 'has no time, since the sheet has no column for it' };
    const stamp = this.parse(row, column);
    switch (stamp.kind) {
      case 'missing':
        return { code: 'time-missing', why: 'has no time; fill it in', column };
      case 'bad':
        return { code: stamp.code, why: stamp.why, column };
      case 'ambiguous': {
        const text = cellText(row.cells[column])!;
        const { dayFirst: one, monthFirst: other } = stamp;
        this.asks.note('date-order', { row: row.number, column, one, other, text });
        const why = `says "${text}", in which day and month could be swapped; say which comes first`;
        return { code: 'ambiguous-date', why, column };
      }
      case 'clock':
        return this.onTheDay(stamp.ms, row, series, column);
      default:
        if (time || !date || !clock) return this.toInstant(stamp, row, series, column);
        return this.withClock(stamp, row, series, column, clock.column);
    }
  }

  /** Says and asks what only the whole sheet shows. */
  finish(): void {
    const { findings, questions } = this.parts;
    this.asks.ask(this.layout, questions, this.rows, (column) => this.habitsOf(column));
    if (this.rows < 2 || this.rowsAtMidnight < this.rows) return;
    const say = (): string => 'has dates without a time of day: every row is taken as 00:00 of its day';
    findings.add('notice', 'no-time-of-day', { sheet: this.layout.sheet }, say);
  }

  private parse(row: SheetRow, column: number): ParsedStamp {
    const cell = row.cells[column];
    return parseStamp(cell, this.parts.dateSystem, cell?.kind === 'text' ? this.habitsOf(column) : undefined);
  }

  /** A time of day alone: on the day that was said, or that a title or the sheet's name gives, and over midnight from there. */
  private onTheDay(clockMs: number, row: SheetRow, series: number, column: number): RowStamp {
    const { sheet, day } = this.layout;
    const said = this.parts.answers.date;
    if (said === undefined && day === null) {
      const text = wallClock(clockMs).slice(11);
      this.asks.note('date-missing', { row: row.number, column, one: clockMs, other: clockMs, text });
      return { code: 'date-missing', why: 'has a time of day without a date; write both, or say the day', column };
    }
    if (!this.hasSaidDay && day !== null && said === undefined) {
      this.hasSaidDay = true;
      const say = (): string =>
        `has times without a date; they begin on ${wallClock(day.localMs).slice(0, 10)}, from ${day.from}`;
      this.parts.findings.add('notice', 'date-from-sheet', { sheet, column }, say);
    }
    const state = this.seriesOf(series);
    const dayMs = said === undefined ? day!.localMs : Date.parse(`${said}T00:00:00Z`);
    const isShiftDate = this.answers.isShiftDate ?? (said === undefined && day!.isShiftDate);
    state.clock ??= new ClockRoll(dayMs, isShiftDate);
    return this.toInstant({ kind: 'local', ms: state.clock.next(clockMs) }, row, series, column);
  }

  private withClock(
    day: ParsedStamp & { ms: number },
    row: SheetRow,
    series: number,
    dayColumn: number,
    column: number,
  ): RowStamp {
    const clock = this.parse(row, column);
    if (clock.kind === 'missing') return { code: 'time-missing', why: 'has a date but no time; fill it in', column };
    if (day.kind !== 'local') return this.toInstant(day, row, series, dayColumn);
    const dayMs = Math.floor(day.ms / DAY) * DAY;
    const isOfDay = clock.kind === 'local' && Math.floor(clock.ms / DAY) * DAY === dayMs;
    const clockMs = isOfDay ? clock.ms - dayMs : clock.kind === 'clock' ? clock.ms : this.clockOnDayZero(row, column);
    if (clockMs === null) {
      if (clock.kind === 'bad' && clock.code !== 'stamp-before-2000')
        return { code: clock.code, why: clock.why, column };
      return { code: 'date-and-time-disagree', why: 'has a date of its own that differs from the date column', column };
    }
    if (isOfDay) return this.toInstant(clock, row, series, column);
    const ms = dayMs + clockMs + this.daysAfterShift(dayMs, clockMs, row, series, column);
    return this.toInstant({ kind: 'local', ms }, row, series, column);
  }

  /** Times of day that a program stored with Excel's day 0 or 1 as their date. */
  private clockOnDayZero(row: SheetRow, column: number): number | null {
    const cell = row.cells[column];
    return cell?.kind === 'number' && cell.number >= 0 && cell.number < 2 ? Math.round((cell.number % 1) * DAY) : null;
  }

  /** A day where the date is the shift's and the time is after midnight, as answered; asks where the rows look like it. */
  private daysAfterShift(dayMs: number, clockMs: number, row: SheetRow, series: number, column: number): number {
    const { shiftDate } = this.seriesOf(series);
    const { isShiftDate } = this.answers;
    shiftDate.next(dayMs, clockMs);
    if (isShiftDate === true) return shiftDate.isNextDay ? DAY : 0;
    if (isShiftDate === undefined && shiftDate.isNextDay && shiftDate.hasStepped) {
      const one = dayMs + clockMs;
      this.asks.note('shift-date', { row: row.number, column, one, other: one + DAY, text: '' });
    }
    return 0;
  }

  private toInstant(stamp: ParsedStamp & { ms: number }, row: SheetRow, series: number, column: number): RowStamp {
    const { order } = this.seriesOf(series);
    const { findings, now, answers } = this.parts;
    const candidates = stamp.kind === 'instant' || this.layout.isUtc ? [stamp.ms] : this.zone.instantsOf(stamp.ms);
    if (candidates.length === 0) {
      const why = `says ${wallClock(stamp.ms)}, which does not exist: the clocks were put forward over it; correct the time, or say in which zone the gauge's clock runs`;
      return { code: 'time-does-not-exist', why, column };
    }
    let at = candidates[0];
    if (candidates.length === 1) order.note(at);
    else {
      const choice = order.choose(candidates[0], candidates[1], answers.repeatedHour);
      if (choice === null) {
        this.asks.note('repeated-hour', { row: row.number, column, one: stamp.ms, other: stamp.ms, text: '' });
        const why = `says ${wallClock(stamp.ms)}, which the clocks showed twice as they were put back, and no row before it tells which; say which, or write it with its offset, such as 2025-10-26T02:30+01:00`;
        return { code: 'repeated-hour', why, column };
      }
      at = choice;
      const pass = at === candidates[0] ? 'first' : 'second';
      const say = (): string =>
        `says ${wallClock(stamp.ms)}, which the clocks showed twice as they were put back; by the order of the rows it is the ${pass}`;
      const place = { sheet: this.layout.sheet, row: row.number, column };
      if (answers.repeatedHour === undefined) findings.add('notice', 'repeated-hour-by-order', place, say);
    }
    if (at > now + AHEAD_TOLERANCE) {
      this.asks.note('ahead-of-now', { row: row.number, column, one: stamp.ms, other: stamp.ms, text: '' });
      const why = `says ${wallClock(stamp.ms)}, which has not come yet; correct the time`;
      return { code: 'stamp-ahead', why, column };
    }
    this.rows += 1;
    if (stamp.ms % DAY === 0) this.rowsAtMidnight += 1;
    return { at };
  }

  private seriesOf(series: number): Series {
    let state = this.series.get(series);
    if (!state) {
      state = { order: new RowOrder(), shiftDate: new ShiftDateRoll(), clock: null };
      this.series.set(series, state);
    }
    return state;
  }

  private habitsOf(column: number): DateHabits {
    let habits = this.habits.get(column);
    if (!habits) {
      habits = { order: this.answers.dateOrder, latest: this.parts.now + DAY };
      this.habits.set(column, habits);
    }
    return habits;
  }
}

const wallClock = (ms: number): string => new Date(ms).toISOString().slice(0, 16).replace('T', ' ');

import type { LayoutAnswers, WorkbookAnswers } from '../answers';
import type { SheetRow } from '../container/sheet-rows';
import type { Findings } from './findings';
import type { Questions } from './questions';
import { RowOrder } from './row-order';
import type { SheetLayout } from './sheet-layout';
import { parseStamp, type ParsedStamp } from './stamps';
import { ZoneClock } from './zone-clock';

const DAY = 86_400_000;
const HALF_DAY = DAY / 2;
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

/** Reads the instants of one sheet's rows, and remembers what of the rows before it needs. */
export class RowStamps {
  private readonly orders = new Map<number, RowOrder>();
  private readonly clocks = new Map<number, { dayMs: number; clockMs: number }>();
  private readonly zone: ZoneClock;
  private rows = 0;
  private rowsAtMidnight = 0;

  constructor(
    private readonly layout: SheetLayout,
    answers: LayoutAnswers,
    private readonly parts: RowStampsParts,
  ) {
    this.zone = answers.timeZone === undefined ? parts.zone : new ZoneClock(answers.timeZone);
  }

  /** @param series the rows' order is followed per series: the channel in the long layout, 0 in the wide */
  read(row: SheetRow, series: number): RowStamp {
    const { time, date, clock } = this.layout;
    const column = (time ?? date)?.column;
    if (column === undefined) return { code: 'time-missing', why: 'has no time, since the sheet has no column for it' };
    const stamp = parseStamp(row.cells[column], this.parts.dateSystem);
    if (stamp.kind === 'missing') return { code: 'time-missing', why: 'has no time; fill it in', column };
    if (stamp.kind === 'bad') return { code: stamp.code, why: stamp.why, column };
    if (stamp.kind === 'clock') {
      return { code: 'date-missing', why: 'has a time of day without a date; write both', column };
    }
    if (time || !clock) return this.toInstant(stamp, row, series, column);
    return this.withClock(stamp, row, series, column, clock.column);
  }

  /** Says what only the whole sheet shows. */
  finish(): void {
    if (this.rows < 2 || this.rowsAtMidnight < this.rows) return;
    this.parts.findings.add(
      'notice',
      'no-time-of-day',
      { sheet: this.layout.sheet },
      () => 'has dates without a time of day: every row is taken as 00:00 of its day',
    );
  }

  private withClock(
    day: ParsedStamp & { ms: number },
    row: SheetRow,
    series: number,
    dayColumn: number,
    column: number,
  ): RowStamp {
    const clock = parseStamp(row.cells[column], this.parts.dateSystem);
    if (clock.kind === 'missing') return { code: 'time-missing', why: 'has a date but no time; fill it in', column };
    if (day.kind !== 'local') return this.toInstant(day, row, series, dayColumn);
    const dayMs = Math.floor(day.ms / DAY) * DAY;
    if (clock.kind === 'local' && Math.floor(clock.ms / DAY) * DAY === dayMs) {
      return this.toInstant(clock, row, series, column);
    }
    const clockMs = clock.kind === 'clock' ? clock.ms : this.clockOnDayZero(row, column);
    if (clockMs === null) {
      if (clock.kind === 'bad' && clock.code !== 'stamp-before-2000')
        return { code: clock.code, why: clock.why, column };
      return { code: 'date-and-time-disagree', why: 'has a date of its own that differs from the date column', column };
    }
    this.watchMidnight(series, dayMs, clockMs, row);
    return this.toInstant({ kind: 'local', ms: dayMs + clockMs }, row, series, column);
  }

  /** Times of day that a program stored with Excel's day 0 or 1 as their date. */
  private clockOnDayZero(row: SheetRow, column: number): number | null {
    const cell = row.cells[column];
    return cell?.kind === 'number' && cell.number >= 0 && cell.number < 2 ? Math.round((cell.number % 1) * DAY) : null;
  }

  private watchMidnight(series: number, dayMs: number, clockMs: number, row: SheetRow): void {
    const before = this.clocks.get(series);
    if (before?.dayMs === dayMs && before.clockMs - clockMs > HALF_DAY) {
      this.parts.findings.add(
        'notice',
        'time-steps-back',
        { sheet: this.layout.sheet, row: row.number },
        () =>
          'has the same date as the row before it but a time more than twelve hours earlier; if the date is the day on which the shift began, the rows after midnight need the next day',
      );
    }
    this.clocks.set(series, { dayMs, clockMs });
  }

  private toInstant(stamp: ParsedStamp & { ms: number }, row: SheetRow, series: number, column: number): RowStamp {
    const order = this.orderOf(series);
    const candidates = stamp.kind === 'instant' || this.layout.isUtc ? [stamp.ms] : this.zone.instantsOf(stamp.ms);
    if (candidates.length === 0) {
      const why = `says ${wallClock(stamp.ms)}, which does not exist: the clocks were put forward over it; correct the time`;
      return { code: 'time-does-not-exist', why, column };
    }
    let at = candidates[0];
    if (candidates.length === 1) order.note(at);
    else {
      const choice = order.choose(candidates[0], candidates[1]);
      if (choice === null) {
        const why = `says ${wallClock(stamp.ms)}, which the clocks showed twice as they were put back, and no row before it tells which; write it with its offset, such as 2025-10-26T02:30+01:00`;
        return { code: 'repeated-hour', why, column };
      }
      at = choice;
      const pass = at === candidates[0] ? 'first' : 'second';
      this.parts.findings.add(
        'notice',
        'repeated-hour-by-order',
        { sheet: this.layout.sheet, row: row.number, column },
        () =>
          `says ${wallClock(stamp.ms)}, which the clocks showed twice as they were put back; by the order of the rows it is the ${pass}`,
      );
    }
    if (at > this.parts.now + AHEAD_TOLERANCE) {
      return {
        code: 'stamp-ahead',
        why: `says ${wallClock(stamp.ms)}, which has not come yet; correct the time`,
        column,
      };
    }
    this.rows += 1;
    if (stamp.ms % DAY === 0) this.rowsAtMidnight += 1;
    return { at };
  }

  private orderOf(series: number): RowOrder {
    let order = this.orders.get(series);
    if (!order) this.orders.set(series, (order = new RowOrder()));
    return order;
  }
}

const wallClock = (ms: number): string => new Date(ms).toISOString().slice(0, 16).replace('T', ' ');

import type { Choice, LayoutAnswers } from '../answers';
import { decide, type DateHabits } from './date-texts';
import type { Questions } from './questions';
import type { SheetLayout } from './sheet-layout';

const DAY = 86_400_000;
/** Fewer rows ahead of now are not a whole sheet. */
const LEAST_AHEAD = 3;

/** Rows that only a person can place in time, and the first of them. */
interface Tally {
  count: number;
  row: number;
  column: number;
  /** What the choices are about: wall clocks in milliseconds, as if they were UTC. */
  one: number;
  other: number;
  text: string;
}

type Matter = 'date-order' | 'date-missing' | 'shift-date' | 'repeated-hour' | 'ahead-of-now';

/** Counts what is asked about one sheet's times, and asks it once the sheet is read. */
export class TimeQuestions {
  private readonly tallies = new Map<Matter, Tally>();

  note(matter: Matter, first: Omit<Tally, 'count'>): void {
    const tally = this.tallies.get(matter);
    if (tally) tally.count += 1;
    else this.tallies.set(matter, { ...first, count: 1 });
  }

  /**
   * @param datedRows rows that have a date and a time that has come already
   * @param habitsOf what a column's dates have shown in the end
   */
  ask(
    { sheet }: Pick<SheetLayout, 'sheet'>,
    questions: Questions,
    datedRows: number,
    habitsOf: (column: number) => DateHabits,
  ): void {
    const put = (matter: Matter, say: (tally: Tally) => string, choicesOf: (tally: Tally) => Choice[]): void => {
      const tally = this.tallies.get(matter);
      if (!tally) return;
      const { row, column, count } = tally;
      questions.ask(matter, { sheet, row, column }, say(tally), count, choicesOf(tally));
    };
    const layout = (label: string, answers: LayoutAnswers): Choice => ({
      label,
      answers: { sheets: { [sheet]: answers } },
    });
    put(
      'date-order',
      ({ text, count, column }) =>
        `says "${text}"${more(count)}, in which day and month could be swapped.${shownLater(habitsOf(column))} Which day is it?`,
      ({ one, other, column }) => {
        const choices = [
          layout(longDay(one), { dateOrder: 'day-month' }),
          layout(longDay(other), { dateOrder: 'month-day' }),
        ];
        return decide(habitsOf(column)) === 'month-day' ? choices.reverse() : choices;
      },
    );
    if (datedRows === 0) {
      put(
        'date-missing',
        ({ text, count }) =>
          `says "${text}"${more(count)}, a time of day, and no date stands beside it, in a title or in the sheet's name. On which day do the rows begin?`,
        () => [],
      );
    }
    put(
      'shift-date',
      ({ one, count }) =>
        `has the date ${longDay(one)} and the time ${clock(one)}, more than twelve hours before the row above under the same date${more(count)}. Is the date that of the day on which the shift began?`,
      ({ one, other }) => [
        layout(`Yes: ${clock(other)} on ${longDay(other)}`, { isShiftDate: true }),
        layout(`No: ${clock(one)} on ${longDay(one)}, as written`, { isShiftDate: false }),
      ],
    );
    put(
      'repeated-hour',
      ({ one, count }) =>
        `says ${clock(one)} on ${longDay(one)}${more(count)}, which the clocks showed twice as they were put back, and no row before it tells which. Which pass was it?`,
      () => [
        { label: 'The first, in summer time', answers: { repeatedHour: 'first' } },
        { label: 'The second, in winter time', answers: { repeatedHour: 'second' } },
      ],
    );
    if (datedRows === 0 && (this.tallies.get('ahead-of-now')?.count ?? 0) >= LEAST_AHEAD) {
      put(
        'ahead-of-now',
        ({ one, count }) =>
          `says ${clock(one)} on ${longDay(one)}, and all ${count} times on the sheet have not come yet. Was the gauge's clock wrong? Correct the times and upload the workbook again.`,
        () => [],
      );
    }
  }
}

const more = (count: number): string => (count === 1 ? '' : ` (and so do ${count - 1} more rows)`);

function shownLater(habits: DateHabits): string {
  const order = decide(habits);
  if (order === null) return '';
  return ` Rows further down have the ${order === 'day-month' ? 'day' : 'month'} first.`;
}

/** "3 April 2026". */
const longDay = (ms: number): string =>
  new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(ms);
const clock = (ms: number): string => new Date(((ms % DAY) + DAY) % DAY).toISOString().slice(11, 16);

import { columnLetters } from '../container/cell-names';
import type { Choice, Question } from '../answers';
import { ownText, type Findings, type Place } from './findings';

/** More questions than anybody would answer; the first ones are asked. */
const MAX_QUESTIONS = 60;

/** Collects what only a person can say. Each question is a blocking problem too. */
export class Questions {
  readonly asked: Question[] = [];

  constructor(private readonly findings: Findings) {}

  /**
   * Asks, unless the same choices were offered for the same column before; then its rows are added to that question.
   *
   * @param place the sheet, and the column it is about; with a row, the first row it is about
   * @param text what follows the place: a verb phrase that ends in the question
   * @param rows how many rows it is about
   */
  ask(code: string, place: Place, text: string, rows: number, choices: Choice[]): void {
    const column = place.column === undefined ? null : columnLetters(place.column);
    const same = this.asked.find(
      (one) => one.code === code && one.sheet === place.sheet && one.column === column && isAlike(one.choices, choices),
    );
    if (same) {
      same.rows += rows;
      return;
    }
    this.findings.add('blocking', code, place, () => text);
    if (this.asked.length >= MAX_QUESTIONS) return;
    this.asked.push({
      code,
      sheet: place.sheet,
      column,
      detail: ownText(`${this.findings.placeText(place)} ${text}`),
      rows,
      choices,
    });
  }
}

const isAlike = (one: readonly Choice[], other: readonly Choice[]): boolean =>
  JSON.stringify(one.map(({ answers }) => answers)) === JSON.stringify(other.map(({ answers }) => answers));

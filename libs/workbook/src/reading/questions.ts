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
   * @param place the sheet, and the column it is about; with a row, the first row it is about
   * @param text what follows the place: a verb phrase that ends in the question
   * @param rows how many rows it is about
   */
  ask(code: string, place: Place, text: string, rows: number, choices: Choice[]): void {
    this.findings.add('blocking', code, place, () => text);
    if (this.asked.length >= MAX_QUESTIONS) return;
    const column = place.column === undefined ? null : columnLetters(place.column);
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

import type { Choice, LayoutAnswers, RememberedLayout } from '../answers';
import { columnOf } from '../container/cell-names';
import type { Header } from './header';
import type { Questions } from './questions';

export interface ChangedLayout {
  sheet: string;
  header: Header;
  inForce: LayoutAnswers;
  remembered: RememberedLayout;
  hasCells: (column: number) => boolean;
}

/** Asks how a sheet is to be read whose name is known, but with another header than the one that stands there. */
export function askAboutChange(
  { sheet, header, inForce, remembered, hasCells }: ChangedLayout,
  questions: Questions,
): void {
  const choices: Choice[] = [{ label: 'As recognised now', answers: { sheets: { [sheet]: inForce } } }];
  const { answers } = remembered;
  const letters = Object.entries(answers.columns ?? {}).flatMap(([key, { role }]) => (role === 'ignored' ? [] : [key]));
  const fits = letters.length > 0 && letters.every((key) => hasCells(columnOf(`${key}1`)));
  if (fits && answers.headerRow !== null) {
    const asBefore = { ...answers, headerRow: header.row };
    choices.push({ label: 'As remembered, column by column', answers: { sheets: { [sheet]: asBefore } } });
  }
  questions.ask(
    'layout-changed',
    { sheet, row: header.row },
    'has another header than the one remembered for a sheet of this name, so it may mean something else; look at its columns: how are they to be read?',
    0,
    choices,
  );
}

import type { SetUpProblem } from './document';
import { SHEETS } from './sheets';

/** Problems listed of one sheet; the rest are counted. */
export const MAX_PROBLEMS_PER_SHEET = 50;

/** Collects problems sheet by sheet; beyond the limit they are only counted. */
export class ProblemList {
  private readonly bySheet = new Map<string | null, { listed: SetUpProblem[]; more: number }>();

  constructor(private readonly limit = MAX_PROBLEMS_PER_SHEET) {}

  add(problem: SetUpProblem): void {
    const { sheet } = problem;
    const found = this.bySheet.get(sheet) ?? { listed: [], more: 0 };
    this.bySheet.set(sheet, found);
    const isKnown = found.listed.some((one) => one.cell === problem.cell && one.code === problem.code);
    if (isKnown && problem.cell !== null) return;
    if (found.listed.length < this.limit) found.listed.push(problem);
    else found.more += 1;
  }

  get isEmpty(): boolean {
    return this.bySheet.size === 0;
  }

  /** In the order of the sheets and of their rows. */
  list(): SetUpProblem[] {
    const place = (sheet: string | null) => (sheet === null ? -1 : SHEETS.findIndex(({ name }) => name === sheet));
    return [...this.bySheet]
      .sort(([one], [other]) => place(one) - place(other))
      .flatMap(([sheet, { listed, more }]) => {
        const sorted = listed.sort((one, other) => rowOf(one) - rowOf(other));
        return more === 0 ? sorted : [...sorted, { sheet, cell: null, code: 'more-problems', ...moreOf(more) }];
      });
  }
}

const rowOf = ({ cell }: SetUpProblem): number => Number(/\d+$/.exec(cell ?? '')?.[0] ?? 0);

const moreOf = (more: number) => ({
  what: `${more} more ${more === 1 ? 'problem of this sheet is' : 'problems of this sheet are'} not listed.`,
  whatToDo: 'Mend those that are listed and drop the workbook again.',
});

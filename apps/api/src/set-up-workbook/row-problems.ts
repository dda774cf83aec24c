import { DomainError } from '@app/contracts';
import { type Transaction, withConflicts } from '@app/data';
import { cellOf, ProblemList, sentencesOf, type SetUpPlaces, type SheetKey, sheetOf } from '@app/workbook';
import { SET_UP_CONFLICTS } from '../set-up/conflicts';

/** Fields of requests whose columns are called otherwise. */
const COLUMN_OF: Record<string, string> = {
  since: 'gaugeSince',
  gaugeId: 'gauge',
  lineId: 'line',
  lineIds: 'lines',
  characteristicId: 'characteristic',
  productId: 'product',
  allowanceNoticeShare: 'allowanceNoticePercent',
  allowanceCapShare: 'allowanceCapPercent',
};
interface Said {
  what: string;
  whatToDo: string;
}

const OTHERWISE = 'Put the cell right and drop the workbook again.';

/** Runs what rows ask for, each in a savepoint, and turns refusals into problems at their cells. */
export class RowProblems {
  readonly problems = new ProblemList();
  readonly notices = new ProblemList();

  constructor(
    private readonly tx: Transaction,
    private readonly places: SetUpPlaces,
  ) {}

  /** The outcome, or undefined when the row was refused: then nothing of it stays. */
  async attempt<T>(
    sheet: SheetKey,
    index: number,
    field: string,
    work: (tx: Transaction) => Promise<T>,
  ): Promise<T | undefined> {
    try {
      return await withConflicts(SET_UP_CONFLICTS, () => this.tx.transaction(work));
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      for (const { pointer, code, detail } of error.fields) {
        const [, at, name] = /^\/shifts\/(\d+)\/(\w+)$/.exec(pointer) ?? [null, String(index), pointer.slice(1)];
        this.say(sheet, Number(at), this.columnOf(sheet, name) ?? field, code, sentencesOf(detail, OTHERWISE));
      }
      if (error.fields.length === 0) this.say(sheet, index, field, error.code, sentencesOf(error.detail, OTHERWISE));
      return undefined;
    }
  }

  /** Says what stops the workbook. */
  say(sheet: SheetKey, index: number, field: string, code: string, said: Said): void {
    this.problems.add({ ...this.placeOf(sheet, index, field), code, ...said });
  }

  /** Says what is not used and stops nothing. */
  notice(sheet: SheetKey, index: number, field: string, code: string, said: Said): void {
    this.notices.add({ ...this.placeOf(sheet, index, field), code, ...said });
  }

  private placeOf(sheet: SheetKey, index: number, field: string): { sheet: string; cell: string } {
    return { sheet: sheetOf(sheet).name, cell: cellOf(this.places, sheet, index, field) };
  }

  private columnOf(sheet: SheetKey, name: string): string | undefined {
    const key = COLUMN_OF[name] ?? name;
    return sheetOf(sheet).columns.find((column) => column.key === key)?.key;
  }
}

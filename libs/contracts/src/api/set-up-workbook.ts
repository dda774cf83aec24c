/**
 * The whole set-up of a plant as one workbook. GET plants/:id/set-up/workbook downloads it; POST plants/:id/set-up/workbook?confirm=no|yes takes
 * one as multipart field `file`. `confirm=no` answers what would happen, with the problems where there are any; `confirm=yes` applies it as
 * a whole, or answers 422 with a problem's `errors` by cell (pointer `/Lines/A3`) and changes nothing. Both take `set_up_plant`.
 */
export interface SetUpWorkbookView {
  isApplied: boolean;
  /** What must be put right before it can be applied; nothing is applied while there are any. */
  problems: SetUpWorkbookProblem[];
  /** What was not used or looks doubtful, and stops nothing. */
  notices: SetUpWorkbookProblem[];
  /** A sentence a sheet: "3 lines added, 1 unchanged." Empty while the workbook cannot be compared. */
  summary: string[];
  /** A sentence a row that is added or changed, at most 500; `changeCount` counts all. */
  changes: string[];
  changeCount: number;
}

export interface SetUpWorkbookProblem {
  /** Null when it concerns the file. */
  sheet: string | null;
  /** Such as "B4"; null when it concerns the whole sheet. */
  cell: string | null;
  code: string;
  /** A sentence: what is wrong. */
  what: string;
  /** A sentence: what to do. */
  whatToDo: string;
}

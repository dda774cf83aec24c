import type { SetUpWorkbookProblem, SetUpWorkbookView } from '@app/contracts';

export const counted = (count: number, one: string, many: string) =>
  `${count.toLocaleString('en-GB')} ${count === 1 ? one : many}`;

/** "Lines, A3". */
export function placeWords({ sheet, cell }: Pick<SetUpWorkbookProblem, 'sheet' | 'cell'>): string {
  if (sheet === null) return 'The file';
  return cell === null ? sheet : `${sheet}, ${cell}`;
}

/** What became of the workbook, or would, in a sentence. */
export function outcomeHeading(fileName: string, { isApplied, problems, changeCount }: SetUpWorkbookView): string {
  if (problems.length > 0) {
    const count = counted(problems.length, 'problem is', 'problems are');
    return `${fileName} cannot be applied yet: ${count} to be put right. Mend the cells, save it and drop it again.`;
  }
  if (changeCount === 0) return `${fileName} says what is there already: nothing changes.`;
  const rows = counted(changeCount, 'row', 'rows');
  return isApplied ? `${fileName} was applied: ${rows} added or changed.` : `${fileName} would add or change ${rows}.`;
}

import type { Choice } from '../answers';
import type { LotBook, LotEntry } from './lot-book';
import type { Questions } from './questions';

/** More doubtful spellings than this are asked about in one question. */
const MAX_SINGLE = 5;
const MAX_EXAMPLES = 3;

interface Doubt {
  entry: LotEntry;
  /** The number that is perhaps meant. */
  meant: string;
  isOnLine: boolean;
}

/**
 * Folds a lot number to what is compared: without case, blanks, hyphens, and zeros at the front of its numbers, so that
 * "L-0123", "L123" and "l 0123" fold alike.
 */
export const foldLot = (number: string): string =>
  number
    .normalize('NFKC')
    .toLowerCase()
    .replace(/(?<!\d)0+(?=\d)/g, '')
    .replace(/[\s\p{Pd}_]/gu, '');

/**
 * Asks about lot numbers that may be other spellings of a lot of the line, or of one in the same workbook. Nothing is
 * merged by itself: until it is answered each spelling is a lot, and the workbook waits.
 *
 * @param lots the lots of the workbook, as met
 * @param known numbers of the line's lots
 */
export function askAboutSpellings(lots: LotBook, known: readonly string[], questions: Questions): void {
  const doubts = findDoubts(lots, known);
  if (doubts.length > MAX_SINGLE) return askTogether(doubts, questions);
  for (const { entry, meant, isOnLine } of doubts) {
    const { number } = entry.summary;
    const other = isOnLine ? `lot ${meant} of this line` : `lot ${meant} in this workbook`;
    questions.ask(
      'lot-spelling',
      { sheet: entry.sheet, row: entry.row },
      `and ${entry.rows === 1 ? 'no other row' : `${entry.rows - 1} more`} name the lot "${number}", which is spelled almost like ${other}: is it the same?`,
      entry.rows,
      [
        { label: `The same lot: ${meant}`, answers: { lots: { [number]: meant } } },
        { label: 'Two different lots', answers: { lots: { [number]: number } } },
      ],
    );
  }
}

function askTogether(doubts: readonly Doubt[], questions: Questions): void {
  const [first] = doubts;
  const examples = doubts
    .slice(0, MAX_EXAMPLES)
    .map(({ entry, meant }) => `"${entry.summary.number}" for "${meant}"`)
    .join(', ');
  const answer = (pick: (doubt: Doubt) => string): Choice['answers'] => ({
    lots: Object.fromEntries(doubts.map((doubt) => [doubt.entry.summary.number, pick(doubt)])),
  });
  questions.ask(
    'lot-spelling',
    { sheet: first.entry.sheet, row: first.entry.row },
    `is the first of those that name ${doubts.length} lots which are spelled almost like lots that are known (${examples}, …): are they the same?`,
    doubts.reduce((sum, { entry }) => sum + entry.rows, 0),
    [
      { label: 'The same lots, each', answers: answer(({ meant }) => meant) },
      { label: 'Different lots, each', answers: answer(({ entry }) => entry.summary.number) },
    ],
  );
}

function findDoubts(lots: LotBook, known: readonly string[]): Doubt[] {
  const onLine = new Map<string, string>();
  for (const number of known) if (!onLine.has(foldLot(number))) onLine.set(foldLot(number), number);
  const exact = new Set(known);
  const groups = new Map<string, LotEntry[]>();
  for (const entry of lots.entries()) {
    const key = foldLot(entry.summary.number);
    const group = groups.get(key);
    if (group) group.push(entry);
    else groups.set(key, [entry]);
  }
  const doubts: Doubt[] = [];
  for (const [key, entries] of groups) {
    const known = onLine.get(key);
    const isSettled = ({ summary }: LotEntry): boolean => exact.has(summary.number) || lots.isAgreed(summary.number);
    const meant = known ?? mostUsed(entries).summary.number;
    for (const entry of entries) {
      if (entry.summary.number === meant || isSettled(entry)) continue;
      doubts.push({ entry, meant, isOnLine: known !== undefined });
    }
  }
  return doubts;
}

/** The spelling with the most rows, the first of equals. */
const mostUsed = (entries: readonly LotEntry[]): LotEntry =>
  entries.reduce((best, one) => (one.rows > best.rows ? one : best));

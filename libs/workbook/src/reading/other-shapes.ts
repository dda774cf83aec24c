import type { SheetGrid } from '../answers';
import type { ChannelNames } from './channel-names';
import { foldName } from './names';
import { meaningOf } from './synonyms';

/** Shapes of tables that are recognised but not read. */
export type OtherShape = 'transposed-table' | 'cross-table';

const CLOCK = /^([01]?\d|2[0-3])[:.][0-5]\d(:[0-5]\d)?( ?[ap]\.?m\.?)?$|^([01]?\d|2[0-4]) ?(h|uhr)$/i;
const STAMP = /^\d{4}-\d{2}-\d{2}|^\d{1,2}\.\d{1,2}\.(\d{2}|\d{4})/;
/** Times that stand beside each other before a row counts as a row of times. */
const MIN_TIMES = 3;
const MIN_NAMES = 2;

/**
 * Recognises, among a sheet's first rows, headings that stand down the first column ("Time", "Lot", "Coat weight" below
 * each other), and times across the top over rows of samples.
 */
export function otherShapeOf({ rows }: Pick<SheetGrid, 'rows'>, channels: ChannelNames): OtherShape | null {
  const names = new Set<string>();
  let hasTimes = false;
  for (const { cells } of rows) {
    const texts = Object.values(cells);
    const [first, ...rest] = texts;
    if (first !== undefined && rest.length >= MIN_NAMES) {
      const meaning = meaningOf(foldName(first));
      if (channels.findWithin(first).size > 0) names.add('values');
      else if (meaning !== undefined && meaning !== 'known') names.add(meaning);
    }
    const times = texts.filter((text) => CLOCK.test(text) || STAMP.test(text));
    hasTimes ||= times.length >= MIN_TIMES && times.length >= texts.length - 2;
  }
  const isTimed = ['stamp', 'date', 'clock'].some((name) => names.has(name));
  if (names.has('values') && (names.has('lot') || isTimed) && names.size > 1) return 'transposed-table';
  return hasTimes ? 'cross-table' : null;
}

/** What is said of such a sheet, after its place. */
export const SHAPE_WORDS: Record<OtherShape, string> = {
  'transposed-table':
    'has its headings one below the other and its readings side by side, which is not read; copy the table, insert it with "Transpose" on another sheet, and send the workbook again',
  'cross-table':
    'has the times across the top and the samples down the side, which is not read; write a row for each time with its lot, and a column for each sample headed "Reading 1", "Reading 2"',
};

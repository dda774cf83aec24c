import { parse } from 'csv-parse/sync';
import type { Separator } from './text-facts';

/** Where two separate the rows alike, the first is meant. */
const CANDIDATES: readonly Separator[] = ['\t', ';', '|', ','];
const SAMPLE_ROWS = 200;

/** How every text file is split, whatever its separator. */
export const SPLITTING = {
  relax_quotes: true,
  relax_column_count: true,
  record_delimiter: ['\r\n', '\n', '\r'],
};

/** The separator that a first line such as `sep=;` names, which spreadsheet programs write and understand. */
export function namedSeparator(sample: string): Separator | null {
  const named = /^"?sep=(.)"?[\r\n]/i.exec(sample)?.[1];
  return CANDIDATES.find((candidate) => candidate === named) ?? null;
}

/**
 * The separator by which most rows come out alike and wide: a sign within texts does not stand equally often in every
 * row, and a decimal comma not in the header.
 */
export function recogniseSeparator(sample: string): Separator {
  const judged = CANDIDATES.map((separator) => ({ separator, score: scoreOf(splitSample(sample, separator)) }));
  const best = judged.reduce((one, other) => (other.score > one.score ? other : one));
  return best.score > 0 ? best.separator : ',';
}

/** The sample's first rows that hold something. */
export function splitSample(sample: string, separator: Separator): string[][] {
  const records: string[][] = [];
  const keep = (record: string[]): null => {
    if (record.some((field) => field.trim() !== '')) records.push(record);
    return null;
  };
  try {
    parse(sample, { ...SPLITTING, delimiter: separator, to: SAMPLE_ROWS, on_record: keep });
  } catch {
    // a sample may end within quotes; what came before counts
  }
  return records;
}

/** The number of rows that have the commonest width above one column, weighed by it. */
function scoreOf(records: readonly string[][]): number {
  const counts = new Map<number, number>();
  for (const { length } of records) if (length > 1) counts.set(length, (counts.get(length) ?? 0) + 1);
  return Math.max(0, ...[...counts].map(([width, rows]) => rows * Math.log2(width + 1)));
}

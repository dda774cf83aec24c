import type { WorkbookAnswers } from './answers';
import { openSource } from './container/open-source';
import { noFacts } from './container/sheet-rows';
import { DEFAULT_LIMITS, type ReadLimits } from './limits';
import { ChannelNames } from './reading/channel-names';
import { Findings } from './reading/findings';
import { LotBook } from './reading/lot-book';
import { askAboutSpellings } from './reading/lot-spellings';
import { ProductNames } from './reading/product-names';
import { Questions } from './reading/questions';
import { sayOfWorkbook } from './reading/say-of-workbook';
import { SheetReader, type ReadingParts } from './reading/sheet-reader';
import { ZoneClock } from './reading/zone-clock';
import type { LineContext, OnReadings, ParsedReading, WorkbookReport } from './types';

const BATCH = 2_000;
const FIRST_ROWS = 12;

export interface ReadOptions {
  /** What a person said about this workbook. */
  answers?: WorkbookAnswers;
  limits?: Partial<ReadLimits>;
  /** Called with the data rows read so far, some times a second. */
  onProgress?: (rowsRead: number) => void;
}

/**
 * Reads a workbook's bytes into readings, in one pass and in memory that does not grow with the rows.
 *
 * Long layout: a row a reading (time, lot, product, channel, value, and serial, position, quantity where there are any).
 * Wide layout: time, lot, product and a column a channel, or a column a position of a channel that another header row, a
 * title or the sheet's name gives. The header, of one row or two and one of units, is looked for in the first 40 rows of
 * each sheet; another one further down, or beside it after an empty column, begins another table. Titles above a header
 * give lot, product, channel, unit and day for the rows without their own.
 *
 * `options.answers` go before what is remembered for a header's fingerprint, and that before what is recognised. What
 * only a person can say is asked in `questions`, each of which blocks the workbook. Times without an offset are the
 * plant's unless answered otherwise. Every non-empty row below a sheet's first header counts in `rowsRead`; it either
 * gives a reading or counts in `rowsNotUsed` and has exactly one problem of the severity `row_not_used`.
 *
 * @param bytes the file as it came
 * @param context the line's channels and products, the plant's zone, and the time
 * @param onReadings takes readings in batches of about 2,000 and is awaited; when the promise rejects in the end, what
 *   it was given before is void
 * @returns what was recognised, every problem with its place, and the counts
 * @throws WorkbookRefusedError when the file as a whole cannot be read
 * @throws RangeError when the zone is no IANA zone
 */
export async function readWorkbook(
  bytes: Uint8Array,
  context: LineContext,
  onReadings: OnReadings,
  options: ReadOptions = {},
): Promise<WorkbookReport> {
  const limits = { ...DEFAULT_LIMITS, ...options.limits };
  const zone = new ZoneClock(context.timeZone);
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const source = await openSource(buffer, limits, options.answers ?? {});
  const findings = new Findings(source.text !== null);
  const parts: ReadingParts = {
    channels: new ChannelNames(context.channels),
    products: new ProductNames(context.products),
    lots: new LotBook(options.answers?.lots),
    findings,
    questions: new Questions(findings),
    answers: options.answers ?? {},
    remembered: context.remembered ?? [],
    zone,
    dateSystem: source.dateSystem,
    now: context.now,
    isTextFile: source.text !== null,
    decimalSignSeen: source.text?.decimalSign ?? null,
  };
  const report = emptyReport(source.dateSystem, source.text);
  const leftOut = new Set<string>();
  let batch: ParsedReading[] = [];
  const flush = async (): Promise<void> => {
    if (report.firstRows.length < FIRST_ROWS)
      report.firstRows.push(...batch.slice(0, FIRST_ROWS - report.firstRows.length));
    const full = batch;
    batch = [];
    if (full.length > 0) await onReadings(full);
  };
  for (const sheet of source.sheets) {
    const reader = new SheetReader(sheet.name, sheet.isHidden, parts);
    const facts = noFacts();
    for await (const rows of source.rows(sheet, facts)) {
      for (const row of rows) {
        reader.take(row, batch);
        if (batch.length >= BATCH) await flush();
      }
      options.onProgress?.(report.rowsRead + reader.rowsRead);
    }
    const { columns, grid } = reader.finish(facts, batch);
    report.columns.push(...columns);
    report.grids.push(grid);
    report.sheets.push({ name: sheet.name, headerRow: reader.headerRow, rows: reader.rowsBelow });
    report.rowsRead += reader.rowsRead;
    report.rowsNotUsed += reader.rowsNotUsed;
    report.layout ??= reader.kind;
    if (reader.isLeftOut) leftOut.add(sheet.name);
  }
  await flush();
  askAboutSpellings(parts.lots, context.lots ?? [], parts.questions);
  sayOfWorkbook(report, leftOut, parts);
  return finishReport(report, parts);
}

const emptyReport = (dateSystem: 1900 | 1904, text: WorkbookReport['text']): WorkbookReport => ({
  layout: null,
  sheets: [],
  columns: [],
  dateSystem,
  rowsRead: 0,
  rowsNotUsed: 0,
  readingsParsed: 0,
  lots: [],
  channels: [],
  firstRows: [],
  problems: [],
  problemCounts: [],
  isBlocked: false,
  questions: [],
  grids: [],
  text,
});

function finishReport(report: WorkbookReport, { findings, questions, lots }: ReadingParts): WorkbookReport {
  return {
    ...report,
    readingsParsed: lots.readings,
    lots: lots.listLots(),
    channels: lots.listChannels(),
    problems: findings.problems,
    problemCounts: findings.list(),
    questions: questions.asked,
    isBlocked: findings.countOf('blocking') > 0,
  };
}

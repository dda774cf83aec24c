import type { WorkbookAnswers } from './answers';
import { openSource } from './container/open-source';
import type { SheetFacts } from './container/sheet-rows';
import { DEFAULT_LIMITS, type ReadLimits } from './limits';
import { ChannelNames } from './reading/channel-names';
import { Findings } from './reading/findings';
import { LotBook } from './reading/lot-book';
import { ProductNames } from './reading/product-names';
import { Questions } from './reading/questions';
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
 * Wide layout: time, lot, product and a column a channel. The header is looked for in the first 40 rows of each sheet.
 * Times without an offset are the plant's. Every non-empty row below a header counts in `rowsRead`; it either gives a
 * reading or counts in `rowsNotUsed` and has exactly one problem of the severity `row_not_used`.
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
    lots: new LotBook(),
    findings,
    questions: new Questions(findings),
    answers: options.answers ?? {},
    zone,
    dateSystem: source.dateSystem,
    now: context.now,
    isTextFile: source.text !== null,
    decimalSignSeen: source.text?.decimalSign ?? null,
  };
  const report = emptyReport(source.dateSystem, source.text);
  let batch: ParsedReading[] = [];
  const flush = async (): Promise<void> => {
    if (report.firstRows.length < FIRST_ROWS)
      report.firstRows.push(...batch.slice(0, FIRST_ROWS - report.firstRows.length));
    const full = batch;
    batch = [];
    if (full.length > 0) await onReadings(full);
  };
  for (const sheet of source.sheets) {
    const reader = new SheetReader(sheet.name, parts);
    const facts: SheetFacts = { mergedUntil: [] };
    for await (const rows of source.rows(sheet, facts)) {
      for (const row of rows) {
        reader.take(row, batch);
        if (batch.length >= BATCH) await flush();
      }
      options.onProgress?.(report.rowsRead + reader.rowsRead);
    }
    report.columns.push(...reader.finish(facts, batch));
    report.sheets.push({ name: sheet.name, headerRow: reader.layout?.header.row ?? null, rows: reader.rows });
    report.rowsRead += reader.rowsRead;
    report.rowsNotUsed += reader.rowsNotUsed;
    report.layout ??= reader.layout?.kind ?? null;
    if (sheet.isHidden && reader.rows > 0) {
      parts.findings.add(
        'notice',
        'hidden-sheet-read',
        { sheet: sheet.name },
        () => 'is hidden; it was read like the others',
      );
    }
  }
  await flush();
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
  const hasHeader = report.sheets.some((sheet) => sheet.headerRow !== null);
  for (const { name, headerRow, rows } of report.sheets) {
    if (headerRow !== null || rows === 0) continue;
    findings.add(
      hasHeader ? 'notice' : 'blocking',
      'no-header',
      { sheet: name },
      () =>
        `has no header row in its first 40 rows (one that names time, lot and value, or time, lot and channels), so nothing on it was read (${rows === 1 ? 'one row' : `${rows} rows`})`,
    );
  }
  if (lots.readings === 0 && findings.countOf('blocking') === 0) {
    const sheet = report.sheets[0]?.name ?? '';
    findings.add('blocking', 'no-readings', { sheet }, () => 'and the rest of the workbook give no reading at all');
  }
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

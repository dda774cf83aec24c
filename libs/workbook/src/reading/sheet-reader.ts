import type { LayoutAnswers, WorkbookAnswers } from '../answers';
import type { SheetFacts, SheetRow } from '../container/sheet-rows';
import type { ParsedReading, RecognisedColumn } from '../types';
import type { ChannelNames } from './channel-names';
import type { Findings } from './findings';
import { findHeader, toRecognised } from './header';
import type { LotBook } from './lot-book';
import type { ProductNames } from './product-names';
import type { Questions } from './questions';
import { RowReader } from './row-reader';
import { RowStamps } from './row-stamps';
import { resolveLayout, type SheetLayout } from './sheet-layout';
import { SheetValues } from './sheet-values';
import { isBlank } from './values';
import type { ZoneClock } from './zone-clock';

/** The header stands within this many rows. */
const HEADER_WITHIN = 40;

export interface ReadingParts {
  channels: ChannelNames;
  products: ProductNames;
  lots: LotBook;
  findings: Findings;
  questions: Questions;
  /** What a person said about this workbook. */
  answers: WorkbookAnswers;
  zone: ZoneClock;
  dateSystem: 1900 | 1904;
  now: number;
  /** Every cell of the file is a text, so that a number in one is nothing to speak of. */
  isTextFile: boolean;
  /** Of a text file: the decimal sign that its first rows show beyond doubt. */
  decimalSignSeen: '.' | ',' | null;
}

/** Reads one sheet: looks for the header in its first rows, then turns the rows below it into readings. */
export class SheetReader {
  layout: SheetLayout | null = null;
  rows = 0;
  private waiting: SheetRow[] | null = [];
  private reader: RowReader | null = null;
  private stamps: RowStamps | null = null;
  private cells: SheetValues | null = null;
  private hiddenRows = 0;

  constructor(
    private readonly name: string,
    private readonly parts: ReadingParts,
  ) {}

  get rowsRead(): number {
    return this.reader?.rowsRead ?? 0;
  }

  get rowsNotUsed(): number {
    return this.reader?.rowsNotUsed ?? 0;
  }

  take(row: SheetRow, into: ParsedReading[]): void {
    if (this.waiting === null) return this.readRow(row, into);
    if (row.number <= HEADER_WITHIN) {
      this.waiting.push(row);
      return;
    }
    this.startReading(into);
    this.readRow(row, into);
  }

  /** Says what only the whole sheet shows, and returns the columns as recognised. */
  finish({ mergedUntil }: SheetFacts, into: ParsedReading[]): RecognisedColumn[] {
    if (this.waiting !== null) this.startReading(into);
    this.stamps?.finish();
    this.cells?.finish();
    const { findings } = this.parts;
    const place = { sheet: this.name };
    const headerRow = this.layout?.header.row ?? Infinity;
    const merged = mergedUntil.filter((row) => row > headerRow).length;
    if (merged > 0) {
      findings.add(
        'notice',
        'merged-cells',
        place,
        () =>
          `has merged cells below its header (${merged}); only the first cell of each area holds its content, the others are read as blank`,
      );
    }
    if (this.layout && this.hiddenRows > 0) {
      const say = (): string => `has hidden or filtered rows (${this.hiddenRows}); they were read like the others`;
      findings.add('notice', 'hidden-rows-read', place, say);
    }
    return this.layout?.header.columns.map((column) => toRecognised(this.name, column)) ?? [];
  }

  private startReading(into: ParsedReading[]): void {
    const rows = this.waiting ?? [];
    this.waiting = null;
    const { channels, findings, questions } = this.parts;
    const answers: LayoutAnswers = this.parts.answers.sheets?.[this.name] ?? {};
    const header = findHeader(rows, channels);
    const below = header ? rows.filter((row) => row.number > header.lines.at(-1)!.row) : rows;
    if (header) {
      const layout = resolveLayout(this.name, header, channels, findings);
      this.layout = layout;
      this.stamps = new RowStamps(layout, answers, this.parts);
      this.cells = new SheetValues({ layout, answers, findings, questions });
      this.reader = new RowReader({ ...this.parts, layout, stamps: this.stamps, cells: this.cells });
    }
    for (const row of below) this.readRow(row, into);
  }

  private readRow(row: SheetRow, into: ParsedReading[]): void {
    if (row.cells.every(isBlank)) return;
    this.rows += 1;
    if (row.isHidden) this.hiddenRows += 1;
    this.reader?.read(row, into);
  }
}

import type { LayoutAnswers, RememberedLayout, SheetGrid, WorkbookAnswers } from '../answers';
import type { SheetFacts, SheetRow } from '../container/sheet-rows';
import type { ParsedReading, RecognisedColumn } from '../types';
import { applyColumns } from './apply-columns';
import { askAboutChange } from './changed-layout';
import type { ChannelNames } from './channel-names';
import { chooseHeader, type ChosenHeader } from './choose-header';
import type { Findings } from './findings';
import { GridTaker } from './grid';
import { headerAt, toRecognised, weigh, type Header } from './header';
import { HeaderWatch } from './header-watch';
import { inForceOf } from './in-force';
import { answersFor, changedFrom } from './layout-answers';
import type { LotBook } from './lot-book';
import type { ProductNames } from './product-names';
import type { Questions } from './questions';
import { RowNotUsed } from './row-not-used';
import { sayOfSheet } from './say-of-sheet';
import { Table } from './table';
import { trustRemembered } from './trust-remembered';
import { readTitles, sayTitles, type Titles } from './titles';
import { isBlank } from './values';
import type { ZoneClock } from './zone-clock';

/** The header stands within this many rows. */
export const HEADER_WITHIN = 40;
/** Of the rows above an answered header further down, so many are kept for their titles. */
const MAX_WAITING = 60;
/** Rows that gave no reading, kept as the titles of another table below. */
const MAX_RECENT = 10;
/** Rows that the header of another table may take. */
const HEADER_ROWS = 3;

export interface ReadingParts {
  channels: ChannelNames;
  products: ProductNames;
  lots: LotBook;
  findings: Findings;
  questions: Questions;
  /** What a person said about this workbook. */
  answers: WorkbookAnswers;
  remembered: readonly RememberedLayout[];
  zone: ZoneClock;
  dateSystem: 1900 | 1904;
  now: number;
  /** Every cell of the file is a text, so that a number in one is nothing to speak of. */
  isTextFile: boolean;
  /** Of a text file: the decimal sign that its first rows show beyond doubt. */
  decimalSignSeen: '.' | ',' | null;
}

/**
 * Reads one sheet: looks for the header in its first rows, then turns the rows below it into readings. Another header
 * further down begins another table. Each non-empty row below the first header either gives a reading or is said once as
 * not used.
 */
export class SheetReader {
  rowsRead = 0;
  rowsNotUsed = 0;
  private readonly grid: GridTaker;
  private readonly watch: HeaderWatch;
  private readonly tables: Table[] = [];
  private waiting: SheetRow[] | null = [];
  private waitingUntil: number;
  /** Rows before the first header of `waiting` that are accounted for already. */
  private accounted = 0;
  private recent: SheetRow[] = [];
  private rows = 0;
  private hiddenRows = 0;
  private chosen: ChosenHeader | null = null;

  constructor(
    private readonly name: string,
    private readonly isHidden: boolean,
    private readonly parts: ReadingParts,
  ) {
    this.grid = new GridTaker(parts.dateSystem);
    this.watch = new HeaderWatch(parts.channels);
    this.waitingUntil = Math.max(HEADER_WITHIN, (parts.answers.sheets?.[name]?.headerRow ?? 0) + 2);
  }

  /** Null where no header was found or nothing is to be read. */
  get headerRow(): number | null {
    return this.tables[0]?.header.row ?? null;
  }

  /** Filled rows below the header; all where there is none. */
  get rowsBelow(): number {
    return this.headerRow === null ? this.rows : this.rowsRead;
  }

  get kind(): 'long' | 'wide' | null {
    return this.tables[0]?.layout.kind ?? null;
  }

  /** A person said that nothing on it is to be read. */
  get isLeftOut(): boolean {
    return this.chosen?.answers.headerRow === null;
  }

  take(row: SheetRow, into: ParsedReading[]): void {
    if (row.cells.every(isBlank)) return;
    this.rows += 1;
    if (row.isHidden) this.hiddenRows += 1;
    this.grid.take(row);
    this.route(row, into);
  }

  private route(row: SheetRow, into: ParsedReading[]): void {
    if (this.waiting !== null && row.number > this.waitingUntil) this.startTable(into);
    if (this.waiting === null) this.readRow(row, into);
    else if (this.waiting.push(row) > MAX_WAITING) this.waiting.shift();
  }

  /** Says what only the whole sheet shows. */
  finish(facts: SheetFacts, into: ParsedReading[]): { columns: RecognisedColumn[]; grid: SheetGrid } {
    while (this.waiting !== null) this.startTable(into);
    for (const table of this.tables) table.finish();
    const { chosen, tables, name, isHidden, headerRow, hiddenRows } = this;
    const all = tables.flatMap(({ header }) => header.columns);
    sayOfSheet({ sheet: name, isHidden, headerRow, columns: all, hiddenRows }, facts, this.parts.findings);
    const columns = all.map((column) => toRecognised(name, column));
    const fingerprint = chosen?.header?.fingerprint ?? null;
    const grid: SheetGrid = {
      sheet: this.name,
      fingerprint,
      isRemembered: chosen?.isRemembered ?? false,
      isChanged: this.changedLayout() !== null,
      headerRow: this.headerRow,
      isHidden: this.isHidden,
      rows: this.grid.rows,
      inForce: inForceOf(tables[0]?.header ?? null, chosen?.answers ?? {}),
    };
    return { columns, grid };
  }

  private changedLayout(): RememberedLayout | null {
    const { header = null, isAnswered = false } = this.chosen ?? {};
    if (header === null) return null;
    const changed = changedFrom(this.name, header.fingerprint, this.parts.remembered);
    return isAnswered && this.parts.answers.sheets?.[this.name]?.headerRow === null ? null : changed;
  }

  private startTable(into: ParsedReading[]): void {
    const rows = this.waiting ?? [];
    this.waiting = null;
    const header = this.tables.length === 0 ? this.openFirst(rows) : this.openAnother(rows);
    const fresh = rows.slice(this.accounted);
    this.accounted = 0;
    if (header === null) return;
    const isFirst = this.tables.length === 1;
    this.tables.at(-1)!.learn(fresh.filter((row) => row.number > header.lines.at(-1)!.row));
    for (const row of fresh) {
      if (row.number > header.lines.at(-1)!.row) this.route(row, into);
      else if (!isFirst) this.notUsed(row, TABLE_HEADER);
    }
  }

  private openFirst(rows: readonly SheetRow[]): Header | null {
    const { parts, name } = this;
    const chosen = (this.chosen = chooseHeader(name, rows, parts));
    const { header, answers, isAnswered } = chosen;
    if (header === null || answers.headerRow === null) return null;
    const titles = readTitles(
      rows.filter((row) => row.number < header.lines[0].row),
      parts,
    );
    const hasCells = (column: number): boolean => rows.some((row) => !isBlank(row.cells[column]));
    this.open(header, titles, answers, hasCells);
    const remembered = this.changedLayout();
    if (remembered !== null && !isAnswered) {
      askAboutChange(
        { sheet: name, header, inForce: inForceOf(header, answers), remembered, hasCells },
        parts.questions,
      );
    }
    return header;
  }

  private openAnother(rows: readonly SheetRow[]): Header | null {
    const { parts, name } = this;
    const headers = rows
      .slice(this.accounted)
      .map((_, index) => headerAt(rows, this.accounted + index, parts.channels));
    const header = headers.reduce((best, one) => (weigh(one.columns).score > weigh(best.columns).score ? one : best));
    const { lot, product, day, isNight } = this.tables.at(-1)!.titles;
    const own = readTitles(
      rows.filter((row) => row.number < header.lines[0].row),
      parts,
    );
    const titles: Titles = { lot, product, day, ...own, isNight: isNight || own.isNight };
    const { answers } = answersFor(name, header.fingerprint, { ...parts.answers, sheets: {} }, parts.remembered);
    this.open(header, titles, answers, (column) => rows.some((row) => !isBlank(row.cells[column])));
    return header;
  }

  private open(header: Header, titles: Titles, answers: LayoutAnswers, hasCells: (column: number) => boolean): void {
    const { findings, channels } = this.parts;
    const said = this.parts.answers.sheets?.[this.name]?.columns ?? {};
    const { columns, dropped } = trustRemembered(this.name, header, titles, answers.columns ?? {}, said, channels);
    if (dropped.length > 0) {
      const say = (): string =>
        `has the header of a sheet for which another channel is remembered (column ${dropped.join(', ')}); the channel that this sheet names counts`;
      findings.add('notice', 'remembered-channel-not-used', { sheet: this.name, row: header.row }, say);
    }
    const misfits = applyColumns(header.columns, columns, channels, hasCells);
    for (const misfit of misfits) {
      const say = (): string => `${misfit}; correct it on the sheet`;
      findings.add('blocking', 'answers-do-not-fit', { sheet: this.name, row: header.row }, say);
    }
    sayTitles(this.name, titles, findings);
    this.tables.push(new Table(this.name, header, titles, answers, this.parts));
  }

  private readRow(row: SheetRow, into: ParsedReading[]): void {
    const table = this.tables.at(-1);
    if (!table) return;
    if (this.watch.startsAnother(row, table)) {
      this.waiting = [...this.recent, row];
      this.accounted = this.recent.length;
      this.waitingUntil = row.number + HEADER_ROWS - 1;
      this.recent = [];
      return;
    }
    const result = table.read(row, into);
    if (result) this.notUsed(row, result);
    else {
      this.rowsRead += 1;
      if (this.recent.length > 0) this.recent = [];
    }
  }

  private notUsed(row: SheetRow, { code, why, column }: RowNotUsed): void {
    this.rowsRead += 1;
    this.rowsNotUsed += 1;
    this.parts.findings.add('row_not_used', code, { sheet: this.name, row: row.number, column }, () => why);
    if (this.recent.push(row) > MAX_RECENT) this.recent.shift();
  }
}

const TABLE_HEADER = new RowNotUsed(
  'table-header',
  'is the header of another table, by which the rows below it are read',
);

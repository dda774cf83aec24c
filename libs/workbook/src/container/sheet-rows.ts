import type { ReadLimits } from '../limits';
import { WorkbookRefusedError } from '../refused';
import { corrupt } from './archive';
import { columnOf, MAX_COLUMN } from './cell-names';
import { GENERAL, type CellFormat } from './formats';
import { assertShort, decodeText } from './texts';
import type { OpenWorkbook, SheetPart } from './workbook-parts';
import { isTrue, parseXml, type Attributes } from './xml';

/** A cell that holds something; `number` is NaN and `text` is '' where they do not apply. */
export interface Cell {
  kind: 'number' | 'text' | 'error' | 'boolean' | 'formula-without-result';
  number: number;
  text: string;
  format: CellFormat;
}

export interface SheetRow {
  number: number;
  /** By column number from 1; a column without a cell is undefined. */
  cells: (Cell | undefined)[];
  isHidden: boolean;
}

/** Counts cells over all sheets of a workbook. */
export interface CellCount {
  cells: number;
}

/**
 * Counts one more cell.
 *
 * @throws WorkbookRefusedError too-many-cells
 */
export function assertRoomForCell(count: CellCount, { maxCells }: ReadLimits): void {
  count.cells += 1;
  if (count.cells <= maxCells) return;
  throw new WorkbookRefusedError(
    'too-many-cells',
    `The workbook has more than ${maxCells.toLocaleString('en')} filled cells. Split it, for example into a workbook a week.`,
  );
}

export interface SheetFacts {
  /** Last row of each merged area. */
  mergedUntil: number[];
  /** Runs of hidden columns, by number from 1. */
  hiddenColumns: { from: number; to: number }[];
}

export const noFacts = (): SheetFacts => ({ mergedUntil: [], hiddenColumns: [] });

/**
 * The rows of one sheet in the order of the file, in groups as they are inflated; empty rows are left out.
 * Rows and cells without their `r` attribute follow the one before them. A formula gives its stored result.
 *
 * @throws WorkbookRefusedError corrupt, too-many-cells, too-large, decompression-bomb
 */
export async function* readSheetRows(
  book: OpenWorkbook,
  sheet: SheetPart,
  limits: ReadLimits,
  count: CellCount,
  facts: SheetFacts = noFacts(),
): AsyncGenerator<SheetRow[]> {
  const parser = new SheetParser(book, limits, count, facts);
  for await (const _ of parseXml(book.archive.read(sheet.part), parser)) {
    if (parser.rows.length > 0) yield parser.takeRows();
  }
}

class SheetParser {
  rows: SheetRow[] = [];
  private row: SheetRow = { number: 0, cells: [], isHidden: false };
  private column = 0;
  private type = '';
  private style = 0;
  private value = '';
  private hasValue = false;
  private isFormula = false;
  private isTaking = false;
  private isPhonetic = false;

  constructor(
    private readonly book: OpenWorkbook,
    private readonly limits: ReadLimits,
    private readonly count: CellCount,
    private readonly facts: SheetFacts,
  ) {}

  takeRows(): SheetRow[] {
    const rows = this.rows;
    this.rows = [];
    return rows;
  }

  open = (name: string, attributes: Attributes): void => {
    switch (name) {
      case 'c':
        this.openCell(attributes);
        break;
      case 'v':
        this.hasValue = true;
        this.isTaking = true;
        break;
      case 't':
        this.isTaking = !this.isPhonetic;
        break;
      case 'f':
        this.isFormula = true;
        break;
      case 'rPh':
        this.isPhonetic = true;
        break;
      case 'row':
        this.openRow(attributes);
        break;
      case 'col':
        if (isTrue(attributes.hidden) && this.facts.hiddenColumns.length < MAX_COLUMN) {
          this.facts.hiddenColumns.push({ from: Number(attributes.min), to: Number(attributes.max) });
        }
        break;
      case 'mergeCell':
        this.facts.mergedUntil.push(Number(/\d+$/.exec(attributes.ref ?? '')?.[0] ?? 0));
        break;
    }
  };

  text = (text: string): void => {
    if (!this.isTaking) return;
    this.value += text;
    assertShort(this.value, this.limits);
  };

  close = (name: string): void => {
    switch (name) {
      case 'v':
      case 't':
        this.isTaking = false;
        break;
      case 'c':
        this.closeCell();
        break;
      case 'rPh':
        this.isPhonetic = false;
        break;
      case 'row':
        if (this.row.cells.length > 0) this.rows.push(this.row);
        this.row = { number: this.row.number, cells: [], isHidden: false };
        break;
    }
  };

  private openRow({ r, hidden }: Attributes): void {
    const number = r === undefined ? this.row.number + 1 : Number(r);
    if (!(number >= 1 && number <= 1_048_576)) throw corrupt(new Error(`row ${r}`));
    this.row = { number, cells: [], isHidden: isTrue(hidden) };
    this.column = 0;
  }

  private openCell({ r, t, s }: Attributes): void {
    this.column = r === undefined ? this.column + 1 : columnOf(r);
    if (this.column < 1 || this.column > MAX_COLUMN) throw corrupt(new Error(`cell ${r}`));
    this.type = t ?? 'n';
    this.style = s === undefined ? 0 : Number(s);
    this.value = '';
    this.hasValue = false;
    this.isFormula = false;
  }

  private closeCell(): void {
    const cell = this.toCell();
    if (!cell) return;
    assertRoomForCell(this.count, this.limits);
    this.row.cells[this.column] = cell;
  }

  private toCell(): Cell | undefined {
    const format = this.book.formats[this.style] ?? GENERAL;
    const { value } = this;
    if (value === '' || (this.type === 'n' && value.trim() === '')) {
      // An empty text as result is said to be one (t="str"); an empty value without a type is a result nobody worked out.
      return this.isFormula && (!this.hasValue || this.type === 'n')
        ? { kind: 'formula-without-result', number: NaN, text: '', format }
        : undefined;
    }
    switch (this.type) {
      case 'n': {
        const number = Number(value);
        if (Number.isNaN(number)) throw corrupt(new Error(`number ${value}`));
        return { kind: 'number', number, text: '', format };
      }
      case 's': {
        const text = this.book.texts[Number(value)];
        if (text === undefined) throw corrupt(new Error(`shared text ${value}`));
        return text === '' ? undefined : { kind: 'text', number: NaN, text, format };
      }
      case 'b':
        return { kind: 'boolean', number: NaN, text: value === '1' ? 'TRUE' : 'FALSE', format };
      case 'e':
        return { kind: 'error', number: NaN, text: value, format };
      default:
        return { kind: 'text', number: NaN, text: decodeText(value), format };
    }
  }
}

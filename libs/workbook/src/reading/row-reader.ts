import type { SheetRow } from '../container/sheet-rows';
import type { ChannelContext, ParsedReading } from '../types';
import type { ChannelNames } from './channel-names';
import type { Findings } from './findings';
import { isRepeatOf } from './header';
import type { HeaderColumn } from './header-cell';
import type { LotBook } from './lot-book';
import type { ProductNames } from './product-names';
import { channelOfRow } from './row-channel';
import { RowNotUsed } from './row-not-used';
import type { RowStamps } from './row-stamps';
import type { SheetLayout } from './sheet-layout';
import type { SheetValues } from './sheet-values';
import { isCheckStandardLabel, isSummaryLabel } from './synonyms';
import { cellText, lotText } from './texts';
import { isBlank, isMissing, parseNumberText } from './values';

export interface RowReaderParts {
  layout: SheetLayout;
  channels: ChannelNames;
  products: ProductNames;
  lots: LotBook;
  stamps: RowStamps;
  cells: SheetValues;
  findings: Findings;
}

/** Turns the rows of one table into readings. A row either gives a reading or the reason why it gives none. */
export class RowReader {
  /** Columns whose cells make a row a data row. */
  private readonly used: readonly HeaderColumn[];

  constructor(private readonly parts: RowReaderParts) {
    this.used = parts.layout.header.columns.filter(({ role }) => role !== 'ignored' && role !== 'remark');
  }

  /** @returns why the row is not used, or undefined when it gave a reading */
  read(row: SheetRow, into: ParsedReading[]): RowNotUsed | undefined {
    const { layout, channels, findings, stamps, lots } = this.parts;
    const set = this.findNonData(row);
    if (set) return set;
    const channel = channelOfRow(row, layout, channels, findings);
    if (channel instanceof RowNotUsed) return channel;
    const stamp = stamps.read(row, channel?.id ?? 0);
    if ('code' in stamp) return new RowNotUsed(stamp.code, stamp.why, stamp.column);
    const lot = this.readLot(row);
    if (lot instanceof RowNotUsed) return lot;
    const product = this.readProduct(row);
    if (product instanceof RowNotUsed) return product;
    const other = lots.productOf(lot);
    if (product !== null && other != null && other !== product) {
      const why = `gives lot ${lot} the product ${product}, but a row before it says ${other}; a lot is of one product`;
      return new RowNotUsed('lot-with-two-products', why, layout.product?.column);
    }
    return this.readValues(row, channel, { lot: lots.own(lot), product: product ?? other ?? null, at: stamp.at }, into);
  }

  /** Rows that are no measurements of product: headers again, totals, check standards, empty ones. */
  private findNonData(row: SheetRow): RowNotUsed | undefined {
    const { used } = this;
    const { layout } = this.parts;
    if (isRepeatOf(layout.header, row)) return new RowNotUsed('repeated-header', 'repeats the header');
    const stampCell = row.cells[(layout.time ?? layout.date)?.column ?? 0];
    const isWithoutTime = isMissing(stampCell) || (stampCell?.kind === 'text' && isSummaryLabel(stampCell.text));
    const label = isWithoutTime && row.cells.find((cell) => cell?.kind === 'text' && isSummaryLabel(cell.text));
    if (label) return new RowNotUsed('summary-row', `is a row of totals ("${label.text.trim()}"), no reading`);
    for (const source of [layout.lot, layout.serial, layout.product]) {
      const cell = source && row.cells[source.column];
      if (cell?.kind === 'text' && isCheckStandardLabel(cell.text)) {
        const why = `says "${cell.text.trim()}": a check standard, no product; record it as a gauge check`;
        return new RowNotUsed('check-standard-row', why, source?.column);
      }
    }
    if (isWithoutTime || stampCell?.kind === 'text') {
      const [only, more] = row.cells.filter((cell) => !isBlank(cell));
      if (only?.kind === 'text' && !more) {
        return new RowNotUsed('row-without-reading', `holds nothing but the text "${only.text.trim().slice(0, 60)}"`);
      }
    }
    if (used.some(({ column }) => !isBlank(row.cells[column]))) return undefined;
    return new RowNotUsed('row-without-reading', 'has neither time nor lot nor value');
  }

  private readLot(row: SheetRow): string | RowNotUsed {
    const { layout, lots } = this.parts;
    const { lot, titles } = layout;
    const cell = lot && row.cells[lot.column];
    if (titles.lot && isMissing(cell)) return lots.meant(titles.lot.value);
    const read = lotText(cell);
    return typeof read === 'string' ? lots.meant(read) : new RowNotUsed(read.code, read.why, lot?.column);
  }

  private readProduct(row: SheetRow): string | null | RowNotUsed {
    const { layout, products, findings } = this.parts;
    const fromTitle = layout.titles.product?.value ?? null;
    if (!layout.product) return fromTitle;
    const { column } = layout.product;
    const text = cellText(row.cells[column]);
    if (text === null && fromTitle !== null) return fromTitle;
    if (text === null) {
      findings.add('notice', 'product-missing', { ...this.place(row), column }, () => 'names no product');
      return null;
    }
    const code = products.find(text);
    if (code !== undefined) return code;
    if (row.cells[column]?.kind === 'number' && row.cells[column].format.isDate) {
      const spoilt =
        'has a date as its product; Excel may have changed a typed code into it, so write the code as text';
      return new RowNotUsed('product-is-a-date', spoilt, column);
    }
    const why = `names the product "${text.slice(0, 60)}", which is not known here (${products.list()})`;
    return new RowNotUsed('unknown-product', why, column);
  }

  private readQuantity(row: SheetRow): Pick<ParsedReading, 'quantity' | 'quantityUnit'> {
    const { layout, findings } = this.parts;
    const cell = layout.quantity && row.cells[layout.quantity.column];
    if (!layout.quantity || isMissing(cell)) return NO_QUANTITY;
    const [, digits, unit] = /^([\d.,\s]+?)\s*(\D*)$/.exec(cell!.text.trim()) ?? [];
    const read =
      cell!.kind === 'number' ? cell!.number : digits ? parseNumberText(digits, { sawDecimalComma: false }) : null;
    if (typeof read === 'number' && read >= 0) {
      return { quantity: read, quantityUnit: unit || layout.quantity.unit };
    }
    findings.add(
      'notice',
      'quantity-not-a-number',
      { ...this.place(row), column: layout.quantity.column },
      () => 'gives a quantity that cannot be read as a number, so the lot gets none from this row',
    );
    return NO_QUANTITY;
  }

  private readValues(
    row: SheetRow,
    channel: ChannelContext | null,
    { lot, product, at }: Pick<ParsedReading, 'lot' | 'product' | 'at'>,
    into: ParsedReading[],
  ): RowNotUsed | undefined {
    const { sheet, values, serial, position } = this.parts.layout;
    const { quantity, quantityUnit } = this.readQuantity(row);
    const serialText = serial ? cellText(row.cells[serial.column]) : null;
    const positionText = position ? cellText(row.cells[position.column]) : null;
    let only: RowNotUsed | undefined;
    let used = 0;
    for (const source of values) {
      const result = this.parts.cells.read(row, source, (source.channel ?? channel)!, product);
      if (result instanceof RowNotUsed) {
        if (values.length === 1) only = result;
        else this.sayOfCell(row, result);
        continue;
      }
      used += 1;
      // Written out, not spread: this is the innermost loop, and spreading makes it several times slower.
      const reading: ParsedReading = {
        sheet,
        row: row.number,
        column: source.letters,
        lot,
        product,
        quantity,
        quantityUnit,
        channelId: result.channelId,
        at,
        value: result.value,
        censoring: result.censoring,
        serial: serialText,
        position: source.position ?? positionText,
      };
      this.parts.lots.add(reading);
      into.push(reading);
    }
    return used > 0 ? undefined : (only ?? new RowNotUsed('no-value', 'has no value that can be used'));
  }

  private sayOfCell(row: SheetRow, { code, why, column }: RowNotUsed): void {
    const severity = code === 'value-missing' ? 'notice' : 'cell_not_used';
    this.parts.findings.add(severity, code, { ...this.place(row), column }, () => why);
  }

  private place(row: SheetRow): { sheet: string; row: number } {
    return { sheet: this.parts.layout.sheet, row: row.number };
  }
}

const NO_QUANTITY = { quantity: null, quantityUnit: null };

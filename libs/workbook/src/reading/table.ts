import type { LayoutAnswers } from '../answers';
import type { SheetRow } from '../container/sheet-rows';
import type { ParsedReading } from '../types';
import { isRepeatOf, type Header } from './header';
import { RowNotUsed } from './row-not-used';
import { RowReader } from './row-reader';
import { RowStamps } from './row-stamps';
import { resolveLayout, type SheetLayout } from './sheet-layout';
import type { ReadingParts } from './sheet-reader';
import { SheetValues } from './sheet-values';
import type { Titles } from './titles';

interface Block {
  layout: SheetLayout;
  stamps: RowStamps;
  cells: SheetValues;
  reader: RowReader;
}

/** One table of a sheet: a header with the rows below it, or several tables side by side under one row of headers. */
export class Table {
  private readonly blocks: Block[];

  constructor(
    private readonly sheet: string,
    readonly header: Header,
    readonly titles: Titles,
    answers: LayoutAnswers,
    private readonly parts: ReadingParts,
  ) {
    this.blocks = blocksOf(header).map((part) => {
      const layout = resolveLayout(sheet, part, titles, parts);
      const stamps = new RowStamps(layout, answers, parts);
      const cells = new SheetValues({ ...parts, layout, answers, said: parts.answers.sheets?.[sheet] ?? {} });
      return { layout, stamps, cells, reader: new RowReader({ ...parts, layout, stamps, cells }) };
    });
  }

  get layout(): SheetLayout {
    return this.blocks[0].layout;
  }

  isRepeatedBy(row: SheetRow): boolean {
    return isRepeatOf(this.header, row);
  }

  /** Looks how dates and numbers are written in the first rows, before they are read. */
  learn(rows: readonly SheetRow[]): void {
    for (const { stamps, cells } of this.blocks) {
      stamps.learn(rows);
      cells.learn(rows);
    }
  }

  /** @returns why the row is not used, or undefined when it gave a reading */
  read(row: SheetRow, into: ParsedReading[]): RowNotUsed | undefined {
    if (this.blocks.length === 1) return this.blocks[0].reader.read(row, into);
    const results = this.blocks.map(({ reader }) => reader.read(row, into));
    const refusals = results.filter((result) => result !== undefined);
    const isUsed = refusals.length < results.length;
    const telling = refusals.filter(({ code }) => code !== 'row-without-reading');
    if (!isUsed) return telling[0] ?? refusals[0];
    for (const { code, why, column } of telling) {
      this.parts.findings.add('cell_not_used', code, { sheet: this.sheet, row: row.number, column }, () => why);
    }
    return undefined;
  }

  /** Says and asks what only the whole table shows. */
  finish(): void {
    for (const { stamps, cells } of this.blocks) {
      stamps.finish();
      cells.finish();
    }
  }
}

/** The headers of the tables side by side; columns of one that cannot be read stay with the first. */
function blocksOf(header: Header): Header[] {
  const numbers = new Set(header.columns.map(({ block }) => Math.max(block, 0)));
  if (numbers.size < 2) return [header];
  return [...numbers].map((number) => ({
    ...header,
    columns: header.columns.filter(({ block }) => Math.max(block, 0) === number),
  }));
}

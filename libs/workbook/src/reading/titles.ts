import { columnLetters } from '../container/cell-names';
import type { Cell, SheetRow } from '../container/sheet-rows';
import type { ChannelNames } from './channel-names';
import type { Findings } from './findings';
import { foldName } from './names';
import type { ProductNames } from './product-names';
import { isNightName } from './sheet-day';
import { parseStamp } from './stamps';
import { meaningOf, type HeaderMeaning } from './synonyms';
import { cellText, lotText } from './texts';

const DAY = 86_400_000;

/** Something that a title gives for the whole sheet, and the cell in which it stands ("cell B2"). */
export interface Given<T> {
  value: T;
  from: string;
}

/** What the titles above a header give for all rows below it. */
export interface Titles {
  lot?: Given<string>;
  /** The product's code. */
  product?: Given<string>;
  /** The channels that a title may mean. */
  channels?: Given<ReadonlySet<number>>;
  /** Midnight in milliseconds, as if it were UTC. */
  day?: Given<number>;
  unit?: Given<string>;
  isNight: boolean;
  /** What two titles give differently, so that neither is used. */
  disagreeing: Kind[];
}

export interface TitleParts {
  channels: ChannelNames;
  products: ProductNames;
  dateSystem: 1900 | 1904;
}

type Kind = 'lot' | 'product' | 'channels' | 'day' | 'unit';
const KIND: Partial<Record<HeaderMeaning, Kind>> = {
  lot: 'lot',
  product: 'product',
  characteristic: 'channels',
  gauge: 'channels',
  date: 'day',
  stamp: 'day',
  clock: 'day',
  unit: 'unit',
};

/**
 * Reads what title rows say of the whole sheet: "Lot: 24117", "Date 02.03.2026", "Characteristic" beside "Coat weight",
 * or a channel's name by itself.
 */
export function readTitles(rows: readonly SheetRow[], parts: TitleParts): Titles {
  const titles: Titles = { isNight: false, disagreeing: [] };
  for (const row of rows) {
    for (const [column, cell] of row.cells.entries()) {
      if (cell?.kind !== 'text') continue;
      if (isNightName(cell.text)) titles.isNight = true;
      const alone = parts.channels.find(cell.text);
      if (alone.size > 0) take(titles, 'channels', alone, row, column);
      const labelled = labelOf(cell.text, row, column);
      if (labelled) takeLabelled(titles, labelled.kind, labelled.cell, row, labelled.column, parts);
    }
  }
  return titles;
}

/** The kind of thing a cell labels, with the cell that holds it: the rest of this one, or the next filled one. */
function labelOf(text: string, row: SheetRow, column: number): { kind: Kind; cell: Cell; column: number } | null {
  const kindOf = (label: string): Kind | undefined => KIND[meaningOf(foldName(label)) ?? 'known'];
  const colon = /^([^:=]{1,40}?)\s*[:=]\s*(.*)$/s.exec(text.trim());
  const kind = kindOf(colon ? colon[1] : text);
  const rest = colon?.[2] ?? '';
  if (kind && rest !== '') return { kind, cell: textCell(row.cells[column]!, rest), column };
  if (kind) {
    const next = row.cells.findIndex((cell, at) => at > column && cell !== undefined);
    const cell = next > column && next <= column + 4 ? row.cells[next]! : null;
    const isLabel = cell?.kind === 'text' && (meaningOf(foldName(cell.text)) !== undefined || /:\s*$/.test(cell.text));
    return cell && !isLabel ? { kind, cell, column: next } : null;
  }
  const words = /^(\S+(?: (?:no|nr|number|code)\.?)?) +(\S.*)$/i.exec(text.trim());
  if (!words) return null;
  const first = kindOf(words[1]);
  const isPlain = first === 'day' || first === 'product' || (first === 'lot' && /^\S*\d\S*$/.test(words[2]));
  return first && isPlain ? { kind: first, cell: textCell(row.cells[column]!, words[2]), column } : null;
}

const textCell = (cell: Cell, text: string): Cell => ({ kind: 'text', number: NaN, text, format: cell.format });

function takeLabelled(titles: Titles, kind: Kind, cell: Cell, row: SheetRow, column: number, parts: TitleParts): void {
  const text = cellText(cell);
  if (text === null) return;
  if (kind === 'lot') {
    const lot = lotText(cell);
    if (typeof lot === 'string') take(titles, kind, lot, row, column);
  } else if (kind === 'product') {
    const code = parts.products.find(text);
    if (code !== undefined) take(titles, kind, code, row, column);
  } else if (kind === 'channels') {
    const found = parts.channels.find(text);
    if (found.size > 0) take(titles, kind, found, row, column);
  } else if (kind === 'unit') {
    if (text.length <= 20) take(titles, kind, text.replace(/^[[(]\s*|\s*[\])]$/g, ''), row, column);
  } else {
    const stamp = parseStamp(cell, parts.dateSystem);
    if (stamp.kind === 'local') take(titles, kind, Math.floor(stamp.ms / DAY) * DAY, row, column);
  }
}

function take<K extends Kind>(
  titles: Titles,
  kind: K,
  value: NonNullable<Titles[K]>['value'],
  row: SheetRow,
  column: number,
): void {
  if (titles.disagreeing.includes(kind)) return;
  const known = titles[kind];
  if (known === undefined) {
    titles[kind] = { value, from: `cell ${columnLetters(column)}${row.number}` } as Titles[K];
    return;
  }
  if (kind === 'channels') {
    const both = new Set([...(known.value as ReadonlySet<number>)].filter((id) => (value as Set<number>).has(id)));
    if (both.size > 0) {
      (known as Given<ReadonlySet<number>>).value = both;
      return;
    }
  } else if (known.value === value) return;
  delete titles[kind];
  titles.disagreeing.push(kind);
}

/** Says which titles are used for the rows below them, and which contradict each other. */
export function sayTitles(sheet: string, titles: Titles, findings: Findings): void {
  const { lot, product, unit, disagreeing } = titles;
  const say = (what: string, given: Given<unknown> | undefined, text: string): void => {
    if (!given) return;
    findings.add(
      'notice',
      'title-used',
      { sheet },
      () => `gives ${what} ${text} in ${given.from}: it counts for every row without its own`,
    );
  };
  say('the lot', lot, `"${lot?.value}"`);
  say('the product', product, `"${product?.value}"`);
  say('the unit', unit, `"${unit?.value}"`);
  for (const kind of disagreeing) {
    findings.add(
      'notice',
      'titles-disagree',
      { sheet },
      () => `gives ${KIND_WORDS[kind]} more than once in its titles, and not the same, so none of them is used`,
    );
  }
}

const KIND_WORDS: Record<Kind, string> = {
  lot: 'a lot',
  product: 'a product',
  channels: 'a channel',
  day: 'a date',
  unit: 'a unit',
};

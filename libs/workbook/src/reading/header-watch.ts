import type { SheetRow } from '../container/sheet-rows';
import type { ChannelNames } from './channel-names';
import { headerAt, weigh } from './header';
import { foldName } from './names';
import { meaningOf } from './synonyms';
import type { Table } from './table';

const MAX_KNOWN = 1_000;
const LOOKED_AT = 3;

/** Watches a sheet's rows for the header of another table. */
export class HeaderWatch {
  private readonly known = new Map<string, boolean>();

  constructor(private readonly channels: ChannelNames) {}

  /** Whether a row below `table` is the header of another one. */
  startsAnother(row: SheetRow, table: Table): boolean {
    if (!this.looksLikeNames(row) || table.isRepeatedBy(row)) return false;
    const header = headerAt([row], 0, this.channels);
    if (header.fingerprint === table.header.fingerprint) return false;
    const { score, hasTime, hasLot, hasValues } = weigh(header.columns);
    return score > 0 && hasTime && hasValues && (hasLot || table.titles.lot !== undefined);
  }

  /** A quick look at the first filled cells: all texts, and one of them the name of a column. */
  private looksLikeNames(row: SheetRow): boolean {
    let looked = 0;
    let hasName = false;
    for (const cell of row.cells) {
      if (cell === undefined) continue;
      if (cell.kind !== 'text' || cell.text.length > 60 || /^\d/.test(cell.text)) return false;
      hasName ||= this.isName(cell.text);
      looked += 1;
      if (looked === LOOKED_AT) break;
    }
    return hasName;
  }

  private isName(text: string): boolean {
    let known = this.known.get(text);
    if (known === undefined) {
      known = meaningOf(foldName(text)) !== undefined;
      if (this.known.size < MAX_KNOWN) this.known.set(text, known);
    }
    return known;
  }
}

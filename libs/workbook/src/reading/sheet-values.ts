import type { LayoutAnswers } from '../answers';
import type { SheetRow } from '../container/sheet-rows';
import type { ChannelContext, ParsedReading } from '../types';
import type { Findings } from './findings';
import { isSameUnit } from './names';
import type { Questions } from './questions';
import { RowNotUsed } from './row-not-used';
import type { SheetLayout, ValueColumn } from './sheet-layout';
import { cellText } from './texts';
import { parseValue } from './values';

export interface SheetValuesParts {
  layout: SheetLayout;
  /** What is in force for the sheet. */
  answers: LayoutAnswers;
  findings: Findings;
  questions: Questions;
}

type Value = Pick<ParsedReading, 'channelId' | 'value' | 'censoring'>;

/** Reads the cells of one sheet's columns of values, and remembers what of the cells before they need. */
export class SheetValues {
  constructor(private readonly parts: SheetValuesParts) {}

  read(row: SheetRow, source: ValueColumn, channel: ChannelContext, _product: string | null): Value | RowNotUsed {
    const { layout, findings } = this.parts;
    const { column } = source;
    const place = { sheet: layout.sheet, row: row.number, column };
    const unit = source.unit ?? cellText(layout.unit && row.cells[layout.unit.column]);
    const read = parseValue(row.cells[column], channel.unit, source.habits);
    if (read.kind === 'missing')
      return new RowNotUsed('value-missing', 'has no value, which is not taken as zero', column);
    if (read.kind === 'bad') return new RowNotUsed(read.code, read.why, column);
    if (unit !== null && layout.kind === 'long' && !isSameUnit(unit, channel.unit)) {
      const why = `is in ${unit.slice(0, 20)}, but the channel "${channel.name}" is in ${channel.unit || 'no unit'}; values are not converted`;
      return new RowNotUsed('unit-differs', why, column);
    }
    if (read.kind === 'censored') {
      findings.add(
        'notice',
        'censored-reading',
        place,
        () =>
          `says "${cellText(row.cells[column])}": off scale, so the lot counts a reading ${read.censoring} what the gauge can show, without a value`,
      );
      return { channelId: channel.id, value: null, censoring: read.censoring };
    }
    if (read.note) {
      const { note, value } = read;
      findings.add('notice', note, place, () => NOTES[note](value, channel.unit));
    }
    return { channelId: channel.id, value: read.value, censoring: null };
  }

  /** Says and asks what only the whole sheet shows. */
  finish(): void {}
}

const NOTES = {
  'number-stored-as-text': (value: number, unit: string) => `holds a number as text; it is read as ${value} ${unit}`,
  'percent-cell': (value: number) => `is formatted as a percentage; it is read as ${value} %`,
  'looks-like-a-code': (value: number, unit: string) =>
    `holds ${value} ${unit}, which some instruments write instead of a reading; delete it if it is none`,
};

import Decimal from 'decimal.js';
import type { LayoutAnswers, ValueAnswer } from '../answers';
import type { SheetRow } from '../container/sheet-rows';
import type { ChannelContext, ParsedReading } from '../types';
import type { Findings, Place } from './findings';
import { newHabits, type NumberHabits } from './number-texts';
import type { Questions } from './questions';
import { RowNotUsed } from './row-not-used';
import type { SheetLayout, ValueColumn } from './sheet-layout';
import { cellText } from './texts';
import { relateUnits, type Conversion } from './units';
import { specificationOf } from './value-fit';
import { askOfCodes, askOfDecimalSign, askOfFit, type AmbiguousText } from './value-questions';
import { ValueTrack } from './value-track';
import { parseValue, Tokens, type ParsedValue } from './values';

export interface SheetValuesParts {
  layout: SheetLayout;
  /** What is in force for the sheet. */
  answers: LayoutAnswers;
  /** What of it was said about this workbook, and not remembered of another. */
  said?: LayoutAnswers;
  findings: Findings;
  questions: Questions;
  /** Every cell of the file is a text, so that a number in one is nothing to speak of. */
  isTextFile?: boolean;
  /** The decimal sign that the whole file has shown beyond doubt. */
  decimalSignSeen?: '.' | ',' | null;
}

type Value = Pick<ParsedReading, 'channelId' | 'value' | 'censoring'>;
type ParsedNumber = ParsedValue & { kind: 'value' };

/** Reads the cells of one sheet's columns of values, and remembers what of the cells before they need. */
export class SheetValues {
  private readonly habits = new Map<number, NumberHabits>();
  private readonly tracks = new Map<ValueColumn, Map<number, ValueTrack>>();
  private readonly units = new Map<ValueTrack, Map<string, Conversion | null | RowNotUsed>>();
  private ambiguous: AmbiguousText | null = null;

  constructor(private readonly parts: SheetValuesParts) {}

  /** Looks how numbers are written in the sheet's first rows, before they are read. */
  learn(rows: readonly SheetRow[]): void {
    for (const row of rows)
      for (const { column } of this.parts.layout.values)
        if (row.cells[column]?.kind === 'text') parseValue(row.cells[column], this.habitsOf(column), NOTHING);
    for (const habits of this.habits.values()) habits.assumedPoints = 0;
  }

  read(row: SheetRow, source: ValueColumn, channel: ChannelContext, product: string | null): Value | RowNotUsed {
    const { column } = source;
    const cell = row.cells[column];
    const track = this.trackOf(source, channel);
    const read = parseValue(cell, this.habitsOf(column), track.missing);
    switch (read.kind) {
      case 'missing':
        return new RowNotUsed('value-missing', 'has no value, which is not taken as zero', column);
      case 'bad':
        return new RowNotUsed(read.code, read.why, column);
      case 'ambiguous':
        return this.setAside(read.text, row, column);
      case 'censored': {
        const unit = this.unitOf(row, source, track, read.unit);
        if (unit instanceof RowNotUsed) return unit;
        const say = (): string =>
          `says "${cellText(cell)}": off scale, so the lot counts a reading ${read.censoring} what the gauge can show, without a value`;
        this.parts.findings.add('notice', 'censored-reading', this.place(row, column), say);
        return { channelId: channel.id, value: null, censoring: read.censoring };
      }
      case 'value':
        return this.toValue(read, row, source, track, product);
    }
  }

  /** Says and asks what only the whole sheet shows. */
  finish(): void {
    const { layout, questions, said = this.parts.answers } = this.parts;
    askOfDecimalSign(layout, this.ambiguous, this.habits, questions);
    for (const [source, channels] of this.tracks) {
      for (const track of channels.values()) {
        askOfCodes(layout, source, track, questions);
        const own = said.columns?.[source.letters];
        const { unit, isDeviation } = { ...own, ...own?.channels?.[track.channel.id] };
        if (unit === undefined && isDeviation === undefined) askOfFit(layout, source, track, questions);
      }
    }
  }

  private toValue(
    read: ParsedNumber,
    row: SheetRow,
    source: ValueColumn,
    track: ValueTrack,
    product: string | null,
  ): Value | RowNotUsed {
    const { channel } = track;
    const isShare = read.isPercent && (channel.unit === '' || channel.unit === '1');
    const stated = read.isPercent && !isShare ? '%' : read.unit;
    const number = stated === '%' && read.isPercent ? Number((read.value * 100).toPrecision(15)) : read.value;
    const unit = this.unitOf(row, source, track, stated);
    if (unit instanceof RowNotUsed) return unit;
    const converted = unit === null ? number : unit.convert(number);
    const value = isDeviationIn(track, source) ? this.addNominal(converted, track, product, source) : converted;
    if (value instanceof RowNotUsed) return value;
    // A unit of the cell's own says nothing about its column.
    if (stated === null) track.note(number, product, row.number);
    this.sayHowRead(read, value, row, source, channel);
    return { channelId: channel.id, value, censoring: null };
  }

  private addNominal(
    deviation: number,
    { channel }: ValueTrack,
    product: string | null,
    { column }: ValueColumn,
  ): number | RowNotUsed {
    const nominal = specificationOf(channel, product)?.nominal ?? null;
    if (nominal !== null) return new Decimal(deviation).plus(nominal).toNumber();
    const why = `is a deviation from nominal, but "${channel.name}" has no nominal value for ${product === null ? 'a lot without a product' : `product ${product}`}; give it one in the set-up`;
    return new RowNotUsed('nominal-missing', why, column);
  }

  private sayHowRead(
    { isText, isPercent, uncertainty }: ParsedNumber,
    value: number,
    row: SheetRow,
    { column }: ValueColumn,
    { unit }: ChannelContext,
  ): void {
    const { findings, isTextFile } = this.parts;
    const place = this.place(row, column);
    if (isText && !isTextFile)
      findings.add(
        'notice',
        'number-stored-as-text',
        place,
        () => `holds a number as text; it is read as ${value} ${unit}`,
      );
    if (isPercent)
      findings.add(
        'notice',
        'percent-cell',
        place,
        () => `is formatted as a percentage; it is read as ${value} ${unit}`,
      );
    if (uncertainty !== null)
      findings.add(
        'notice',
        'uncertainty-not-used',
        place,
        () => `gives ± ${uncertainty} beside its value, which is not used; it is read as ${value} ${unit}`,
      );
  }

  /** How a cell's number becomes one in the channel's unit: the unit stated nearest to it counts. */
  private unitOf(
    row: SheetRow,
    source: ValueColumn,
    track: ValueTrack,
    ofCell: string | null,
  ): Conversion | null | RowNotUsed {
    const { layout } = this.parts;
    const ofRow = layout.kind === 'long' && layout.unit ? cellText(row.cells[layout.unit.column]) : null;
    const unit = ofCell ?? track.answer.unit ?? ofRow ?? source.unit;
    if (unit === null || unit === track.channel.unit) return null;
    let known = this.units.get(track);
    if (!known) this.units.set(track, (known = new Map<string, Conversion | null | RowNotUsed>()));
    let conversion = known.get(unit);
    if (conversion === undefined) {
      conversion = this.relate(unit, track.channel, source);
      if (known.size < 1_000) known.set(unit, conversion);
    }
    return conversion;
  }

  private relate(unit: string, channel: ChannelContext, { column }: ValueColumn): Conversion | null | RowNotUsed {
    const relation = relateUnits(unit, channel.unit);
    const [stated, own] = [unit.slice(0, 20), channel.unit || 'no unit'];
    if (relation.kind === 'same') return null;
    if (relation.kind === 'convertible') {
      const { conversion } = relation;
      const place = { sheet: this.parts.layout.sheet, column };
      const say = (): string =>
        `has values of "${channel.name}" in ${stated}; they are converted to ${own} (${conversion.said})`;
      this.parts.findings.add('notice', 'unit-converted', place, say);
      return conversion;
    }
    const why =
      relation.kind === 'unknown'
        ? `is in ${stated}, and how that relates to ${own}, the unit of the channel "${channel.name}", is not known here`
        : `is in ${stated}, but the channel "${channel.name}" is in ${own}, a unit of another quantity`;
    return new RowNotUsed('unit-differs', why, column);
  }

  private setAside(text: string, row: SheetRow, column: number): RowNotUsed {
    this.ambiguous ??= { text, row: row.number, column, count: 0 };
    this.ambiguous.count += 1;
    const why = `holds the text "${text}", which could be read in two ways; say which sign is the decimal sign`;
    return new RowNotUsed('ambiguous-number', why, column);
  }

  private trackOf(source: ValueColumn, channel: ChannelContext): ValueTrack {
    let channels = this.tracks.get(source);
    if (!channels) this.tracks.set(source, (channels = new Map<number, ValueTrack>()));
    let track = channels.get(channel.id);
    if (!track) {
      const { answers } = this.parts;
      const ofColumn = answers.columns?.[source.letters];
      const { unit, isDeviation, missing = [], readings } = { ...ofColumn, ...ofColumn?.channels?.[channel.id] };
      const answer: ValueAnswer = clean({ unit, isDeviation, missing, readings });
      track = new ValueTrack(channel, answer, new Tokens([...(answers.missing ?? []), ...missing]));
      channels.set(channel.id, track);
    }
    return track;
  }

  private habitsOf(column: number): NumberHabits {
    let habits = this.habits.get(column);
    if (!habits) {
      const { answers, decimalSignSeen } = this.parts;
      habits = newHabits(answers.decimalSign);
      if (decimalSignSeen === ',') habits.sawDecimalComma = true;
      if (decimalSignSeen === '.') habits.sawDecimalPoint = true;
      this.habits.set(column, habits);
    }
    return habits;
  }

  private place(row: SheetRow, column: number): Place {
    return { sheet: this.parts.layout.sheet, row: row.number, column };
  }
}

const NOTHING = new Tokens();

export const isDeviationIn = ({ answer }: ValueTrack, source: ValueColumn): boolean =>
  answer.isDeviation ?? source.isDeviation;

/** Without what is undefined or empty, so that it can stand in a further answer. */
const clean = (answer: ValueAnswer): ValueAnswer =>
  Object.fromEntries(
    Object.entries(answer).filter(([, value]) => value !== undefined && !(Array.isArray(value) && value.length === 0)),
  );

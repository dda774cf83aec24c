import type { Choice } from '../answers';
import { answerOfValues } from './column-units';
import { bothReadings, type NumberHabits } from './number-texts';
import type { Questions } from './questions';
import type { SheetLayout, ValueColumn } from './sheet-layout';
import { relateUnits } from './units';
import { betterFits, specificationOf, type Interpretation } from './value-fit';
import type { ValueTrack } from './value-track';

/** The first of the texts that could be two numbers, and how many there are. */
export interface AmbiguousText {
  text: string;
  row: number;
  column: number;
  count: number;
}

/** Asks which sign is the decimal one where texts such as "12,345" stand in columns that do not tell. */
export function askOfDecimalSign(
  { sheet }: SheetLayout,
  ambiguous: AmbiguousText | null,
  habits: ReadonlyMap<number, NumberHabits>,
  questions: Questions,
): void {
  if (ambiguous) {
    const { text, row, column, count } = ambiguous;
    const { decimal, grouped, sign } = bothReadings(text);
    const choices: Choice[] = [
      { label: `"${text}" is ${decimal}`, answers: { sheets: { [sheet]: { decimalSign: sign } } } },
      { label: `"${text}" is ${grouped}`, answers: { sheets: { [sheet]: { decimalSign: sign === ',' ? '.' : ',' } } } },
    ];
    const others = count === 1 ? '' : ` (and ${count - 1} more)`;
    const ask = `holds "${text}"${others}, which is ${decimal} or ${grouped}. Which is it?`;
    questions.ask('decimal-sign', { sheet, row, column }, ask, count, choices);
    return;
  }
  for (const [column, { sawDecimalComma, assumedPoints = 0 }] of habits) {
    if (!sawDecimalComma || assumedPoints === 0) continue;
    const ask = `has numbers such as "10.125" (${assumedPoints}) above numbers with a decimal comma. Is the point in them the decimal sign too?`;
    questions.ask('decimal-sign', { sheet, column }, ask, assumedPoints, [
      { label: '"10.125" is 10.125', answers: { sheets: { [sheet]: { decimalSign: '.' } } } },
      { label: '"10.125" is 10125', answers: { sheets: { [sheet]: { decimalSign: ',' } } } },
    ]);
    return;
  }
}

/** Asks whether a number such as 9999 or 0, far from all others of its channel, stands for a missing value. */
export function askOfCodes(layout: SheetLayout, source: ValueColumn, track: ValueTrack, questions: Questions): void {
  const code = track.suspectCode();
  if (!code) return;
  const { value, count, firstRow, least, most } = code;
  const { channel, answer } = track;
  const inUnit = unitOfColumn(track, source);
  const written = String(value);
  const span = least === most ? `${least}` : `from ${least} to ${most}`;
  const times = count === 1 ? '' : `, the first of ${count} cells that do`;
  const choose = (said: 'missing' | 'readings', label: string): Choice => ({
    label,
    answers: answerOfValues(layout, source, channel, answer, { [said]: [...(answer[said] ?? []), written] }),
  });
  questions.ask(
    'code-or-value',
    { sheet: layout.sheet, row: firstRow, column: source.column },
    `holds ${written}${times}, while all other values of "${channel.name}" are ${span} ${inUnit}. Does ${written} stand for a missing value?`,
    count,
    [
      choose('missing', `${written} stands for a missing value`),
      choose('readings', `${written} ${inUnit} was measured`),
    ],
  );
}

/** Asks about a column whose values fit their characteristic only in another unit, or as deviations from nominal. */
export function askOfFit(layout: SheetLayout, source: ValueColumn, track: ValueTrack, questions: Questions): void {
  const { channel, answer, sample, count } = track;
  const current: Interpretation = {
    unit: unitOfColumn(track, source),
    isDeviation: answer.isDeviation ?? source.isDeviation,
  };
  const better = betterFits(sample, channel, current);
  if (better.length === 0) return;
  const isUnit = better.some(({ unit }) => unit !== current.unit);
  const [example] = sample;
  const read = (as: Interpretation): string => {
    const relation = relateUnits(as.unit, channel.unit);
    const value = relation.kind === 'convertible' ? relation.conversion.convert(example.value) : example.value;
    const nominal = specificationOf(channel, example.product)?.nominal ?? null;
    const sum = as.isDeviation && nominal !== null ? Number((value + nominal).toPrecision(12)) : value;
    return `${sum} ${channel.unit}`;
  };
  const label = (as: Interpretation): string =>
    as.isDeviation
      ? `Deviations from nominal in ${as.unit}: ${example.value} is ${read(as)}`
      : `Values in ${as.unit}: ${example.value} is ${read(as)}`;
  const choose = (as: Interpretation): Choice => ({
    label: label(as),
    answers: answerOfValues(layout, source, channel, answer, as),
  });
  questions.ask(
    isUnit ? 'unit-suspect' : 'deviation-suspect',
    { sheet: layout.sheet, column: source.column },
    `has values such as ${example.value}, which as ${current.isDeviation ? 'deviations from nominal' : 'values'} in ${current.unit || 'no unit'} are far from the specification of "${channel.name}". How are they meant?`,
    count,
    [...better, current].map(choose),
  );
}

const unitOfColumn = ({ answer, channel }: ValueTrack, source: ValueColumn): string =>
  answer.unit ?? source.unit ?? channel.unit;

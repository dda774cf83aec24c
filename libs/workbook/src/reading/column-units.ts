import type { Choice, ValueAnswer, WorkbookAnswers } from '../answers';
import type { ChannelContext } from '../types';
import type { Findings } from './findings';
import type { Questions } from './questions';
import type { SheetLayout, ValueColumn } from './sheet-layout';
import { relateUnits, unitsLike } from './units';

const MOST_UNITS = 5;

/** Answers that say something of the values of one channel in one column, beside what is in force for the column. */
export function answerOfValues(
  { sheet, header }: Pick<SheetLayout, 'sheet' | 'header'>,
  { column, letters }: Pick<ValueColumn, 'column' | 'letters'>,
  channel: ChannelContext,
  inForce: ValueAnswer,
  answer: ValueAnswer,
): WorkbookAnswers {
  const role = header.columns.find((one) => one.column === column)?.role ?? 'value';
  const said = { ...inForce, ...answer };
  const isByRow = role === 'value' && header.columns.some((one) => one.role === 'channel');
  const isOfChannel = role === 'channel_values' ? { channelId: channel.id } : {};
  const columnAnswer = isByRow ? { role, channels: { [channel.id]: said } } : { role, ...isOfChannel, ...said };
  return { sheets: { [sheet]: { columns: { [letters]: columnAnswer } } } };
}

/**
 * Whether a column whose header states a unit can be read: the unit is the channel's, or one of the same quantity. One of
 * another quantity stops the workbook; of one that is not known it is asked.
 */
export function isUnitRight(
  layout: Pick<SheetLayout, 'sheet' | 'header'>,
  source: ValueColumn,
  channel: ChannelContext,
  { findings, questions }: { findings: Findings; questions: Questions },
): boolean {
  if (source.unit === null) return true;
  const relation = relateUnits(source.unit, channel.unit);
  if (relation.kind === 'same' || relation.kind === 'convertible') return true;
  const place = { sheet: layout.sheet, row: layout.header.row, column: source.column };
  const own = channel.unit || 'no unit';
  const stated = `gives "${channel.name}" in ${source.unit.slice(0, 30)}`;
  if (relation.kind === 'other-quantity') {
    const say = (): string =>
      `${stated}, but the channel is in ${own}, a unit of another quantity; correct the header, or say in which unit the values are`;
    findings.add('blocking', 'unit-differs', place, say);
    return false;
  }
  const choices: Choice[] = [channel.unit, ...unitsLike(channel.unit).slice(0, MOST_UNITS)].map((unit) => ({
    label: `The values are in ${unit || 'no unit'}`,
    answers: answerOfValues(layout, source, channel, {}, { unit }),
  }));
  const ignored = { [source.letters]: { role: 'ignored' as const } };
  choices.push({ label: 'Do not use the column', answers: { sheets: { [layout.sheet]: { columns: ignored } } } });
  const text = `${stated}, and how that relates to ${own}, the channel's unit, is not known here. In which unit are the values?`;
  questions.ask('unit-unknown', place, text, 0, choices);
  return false;
}

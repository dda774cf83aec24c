import type { ColumnAnswer, ColumnRole } from '../answers';
import { columnLetters, columnOf } from '../container/cell-names';
import type { ChannelNames } from './channel-names';
import { plainColumn, type HeaderColumn } from './header-cell';
import { SINGLE } from './settle-columns';

/**
 * Puts what a person said about columns in force over what was recognised. A role that only one column may have is taken
 * from a column that was not spoken of; a time in one cell takes the place of date and time of day, and the reverse.
 *
 * @param columns as recognised; changed in place
 * @param answers by column letters
 * @param hasCells whether a column holds anything on the sheet's first rows
 * @returns what does not fit the sheet or the line, a verb phrase each
 */
export function applyColumns(
  columns: HeaderColumn[],
  answers: Readonly<Record<string, ColumnAnswer>>,
  channels: ChannelNames,
  hasCells: (column: number) => boolean,
): string[] {
  const misfits: string[] = [];
  const spoken = new Set<HeaderColumn>();
  for (const [letters, answer] of Object.entries(answers)) {
    const number = columnOf(`${letters}1`);
    let column = columns.find((one) => one.column === number);
    if (!column && number > 0 && (answer.role === 'ignored' || hasCells(number))) {
      columns.push((column = plainColumn(number, '')));
    }
    if (!column) {
      misfits.push(`is said to have its ${WORDS[answer.role]} in column ${letters}, which is empty on it`);
      continue;
    }
    if (answer.role === 'channel_values' && !channels.has(answer.channelId)) {
      misfits.push(`is said to have in column ${letters} the values of a channel that this line does not have`);
      continue;
    }
    spoken.add(column);
    say(column, answer);
  }
  columns.sort((one, other) => one.column - other.column);
  nameTwins([...spoken]);
  return [...misfits, ...giveWay(columns, spoken)];
}

function say(column: HeaderColumn, { role, channelId, unit, isDeviation }: ColumnAnswer): void {
  if (column.role !== role) column.isGauge = false;
  column.role = role;
  column.isUnknown = false;
  column.channelId = role === 'channel_values' ? channelId! : null;
  column.isDeviation = isDeviation ?? false;
  if (unit !== undefined) column.unit = unit;
}

/** Columns said to hold one channel are told apart by their headers where no number does. */
function nameTwins(spoken: readonly HeaderColumn[]): void {
  for (const column of spoken) {
    if (column.role !== 'channel_values' || column.position !== null) continue;
    const twins = spoken.filter((one) => one.channelId === column.channelId && one.role === 'channel_values');
    if (twins.length > 1) column.position = column.header || columnLetters(column.column);
  }
}

function giveWay(columns: readonly HeaderColumn[], spoken: ReadonlySet<HeaderColumn>): string[] {
  const misfits: string[] = [];
  for (const block of new Set(columns.map((column) => column.block))) {
    const own = columns.filter((column) => column.block === block);
    const said = (role: ColumnRole): HeaderColumn[] => own.filter((one) => spoken.has(one) && one.role === role);
    const drop = (...roles: ColumnRole[]): void => {
      for (const column of own) if (!spoken.has(column) && roles.includes(column.role)) column.role = 'ignored';
    };
    for (const role of SINGLE) {
      const [first, second] = said(role);
      if (first) drop(role);
      if (!second) continue;
      const both = `columns ${columnLetters(first.column)} and ${columnLetters(second.column)}`;
      misfits.push(`is said to have its ${WORDS[role]} in two columns (${both}); say one`);
    }
    if (said('time').length > 0) drop('date', 'time_of_day');
    else if (said('date').length + said('time_of_day').length > 0) drop('time');
  }
  return misfits;
}

const WORDS: Record<ColumnRole, string> = {
  time: 'time',
  date: 'date',
  time_of_day: 'time of day',
  lot: 'lot',
  product: 'product',
  channel: 'channel',
  value: 'values',
  unit: 'unit',
  serial: 'serial number',
  position: 'position',
  quantity: 'quantity',
  remark: 'remark',
  channel_values: 'values',
  ignored: 'unused cells',
};

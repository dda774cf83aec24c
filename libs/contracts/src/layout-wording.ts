import type { ColumnRole, LayoutAnswers } from './intake-answers';

/** What a column is for, as the pages say it. */
export const ROLE_WORDS: Record<ColumnRole, string> = {
  time: 'date and time',
  date: 'date',
  time_of_day: 'time of day',
  lot: 'lot',
  product: 'product',
  channel: 'names the channel',
  value: 'value',
  unit: 'unit',
  serial: 'serial number',
  position: 'position',
  quantity: 'quantity of the lot',
  remark: 'remark',
  channel_values: 'values of a channel',
  ignored: 'not used',
};

/** What was answered about a layout, a sentence each; none where it is read as recognised. */
export function layoutSentences(answers: LayoutAnswers, nameOf: (channelId: number) => string): string[] {
  const { headerRow, columns = {}, dateOrder, decimalSign, timeZone, missing = [], isShiftDate } = answers;
  const said: string[] = [];
  if (headerRow === null) said.push('Nothing on it is read.');
  if (typeof headerRow === 'number') said.push(`Row ${headerRow} is the header.`);
  for (const [letters, { role, channelId, unit, isDeviation }] of Object.entries(columns)) {
    const what = channelId === undefined ? ROLE_WORDS[role] : `values of ${nameOf(channelId)}`;
    const inUnit = unit ? ` in ${unit}` : '';
    said.push(`Column ${letters}: ${what}${inUnit}${isDeviation ? ', as deviations from nominal' : ''}.`);
  }
  if (dateOrder === 'day-month') said.push('Dates have the day before the month.');
  if (dateOrder === 'month-day') said.push('Dates have the month before the day.');
  if (decimalSign) said.push(`The decimal sign is the ${decimalSign === ',' ? 'comma' : 'point'}.`);
  if (timeZone) said.push(`Times are those of ${timeZone}.`);
  if (missing.length > 0) said.push(`A missing value is written ${missing.map((one) => `"${one}"`).join(' or ')}.`);
  if (isShiftDate) said.push('Dates are those of the day on which the shift began.');
  return said;
}

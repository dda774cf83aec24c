import type { ColumnAnswer, LayoutAnswers } from '../answers';
import { columnLetters } from '../container/cell-names';
import type { Header } from './header';
import type { HeaderColumn } from './header-cell';

/** What is in force for a sheet after recognition and answers, as answers that would read it the same again. */
export function inForceOf(header: Header | null, answers: LayoutAnswers): LayoutAnswers {
  if (answers.headerRow === null) return { ...answers };
  if (header === null) return { ...answers, headerRow: answers.headerRow ?? null };
  const columns = Object.fromEntries(
    header.columns.map((column) => {
      const letters = columnLetters(column.column);
      const { missing, readings, channels } = answers.columns?.[letters] ?? {};
      const more = Object.entries({ missing, readings, channels }).filter(([, said]) => said !== undefined);
      return [letters, { ...toAnswer(column), ...Object.fromEntries(more) }] as const;
    }),
  );
  return { ...answers, headerRow: header.row, columns };
}

function toAnswer({ role, channelId, unit, isDeviation }: HeaderColumn): ColumnAnswer {
  const answer: ColumnAnswer = { role };
  if (role === 'channel_values' && channelId !== null) answer.channelId = channelId;
  if (unit !== null && ['channel_values', 'value', 'quantity'].includes(role)) answer.unit = unit;
  if (isDeviation) answer.isDeviation = true;
  return answer;
}

import { columnLetters } from '../container/cell-names';
import type { ChannelContext } from '../types';
import type { HeaderColumn } from './header-cell';
import type { LayoutParts, SheetLayout } from './sheet-layout';

/**
 * The channel of a sheet whose columns do not name one: by a title, by the sheet's name, or the line's only one. Where
 * they leave more than one or none, or contradict each other, it is asked.
 */
export function channelOfSheet(
  { sheet, header, titles }: SheetLayout,
  columns: readonly HeaderColumn[],
  { channels, questions }: LayoutParts,
): ChannelContext | null {
  const byTitle = titles.channels?.value;
  const byName = channels.findWithin(sheet);
  const only = channels.only();
  let found = byTitle ?? byName;
  if (byTitle && byName.size > 0) {
    const both = new Set([...byTitle].filter((id) => byName.has(id)));
    found = both.size > 0 ? both : new Set([...byTitle, ...byName]);
  }
  if (found.size === 1) return channels.get([...found][0]);
  if (found.size === 0 && only) return only;
  const candidates = found.size > 0 ? [...found].map((id) => channels.get(id)) : channels.all();
  const answersOf = ({ id }: ChannelContext) => ({
    sheets: {
      [sheet]: {
        columns: Object.fromEntries(
          columns.map(({ column }) => [columnLetters(column), { role: 'channel_values' as const, channelId: id }]),
        ),
      },
    },
  });
  const why =
    found.size > 0
      ? `may be of more than one channel by its ${byTitle ? 'titles' : 'name'}${byTitle && byName.size > 0 ? ' and its name' : ''}`
      : 'has a column of values but none that names the channel';
  questions.ask(
    'no-channel-column',
    { sheet, row: header.row },
    `${why}; of which channel are they? (Another time, name the sheet after the channel.)`,
    0,
    candidates.slice(0, 40).map((channel) => ({ label: channel.name, answers: answersOf(channel) })),
  );
  return null;
}

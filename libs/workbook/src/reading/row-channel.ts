import type { SheetRow } from '../container/sheet-rows';
import type { ChannelContext } from '../types';
import type { ChannelNames } from './channel-names';
import type { Findings } from './findings';
import { RowNotUsed } from './row-not-used';
import type { SheetLayout } from './sheet-layout';
import { cellText } from './texts';

/**
 * The channel that a row names, by its characteristic, its gauge or both; null where the columns of values have theirs.
 * A gauge that the line does not know is said, and the characteristic decides.
 */
export function channelOfRow(
  row: SheetRow,
  layout: SheetLayout,
  channels: ChannelNames,
  findings: Findings,
): ChannelContext | null | RowNotUsed {
  const [first] = layout.channelColumns;
  if (!first) {
    const isOpen = layout.values.some((source) => source.channel === null);
    return isOpen ? new RowNotUsed('channel-missing', 'names no channel') : null;
  }
  let found: ReadonlySet<number> | null = null;
  const unknown: { text: string; column: number; isGauge: boolean }[] = [];
  for (const { column, isGauge } of layout.channelColumns) {
    const text = cellText(row.cells[column]);
    if (text === null) continue;
    const named = channels.find(text);
    if (named.size === 0) unknown.push({ text, column, isGauge });
    else found = found === null ? named : intersect(found, named);
  }
  const stranger = unknown.find((one) => !one.isGauge) ?? (found === null ? unknown[0] : undefined);
  if (stranger) {
    const why = `names "${stranger.text.slice(0, 60)}", which is no channel of this line (${channels.list()})`;
    return new RowNotUsed('unknown-channel', why, stranger.column);
  }
  if (found === null) return new RowNotUsed('channel-missing', 'names no channel; fill it in', first.column);
  if (found.size === 0) return new RowNotUsed('channels-disagree', 'names two different channels', first.column);
  if (found.size > 1) {
    const why = 'names a gauge that measures more than one channel; name the characteristic too';
    return new RowNotUsed('channel-ambiguous', why, first.column);
  }
  for (const { text, column } of unknown) {
    findings.add(
      'notice',
      'unknown-gauge',
      { sheet: layout.sheet, row: row.number, column },
      () => `names the gauge "${text.slice(0, 60)}", which this line does not know; the characteristic decided`,
    );
  }
  return channels.get([...found][0]);
}

const intersect = (one: ReadonlySet<number>, other: ReadonlySet<number>): ReadonlySet<number> =>
  one === other ? one : new Set([...one].filter((id) => other.has(id)));

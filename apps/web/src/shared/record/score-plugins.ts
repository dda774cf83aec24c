import { formatNumber, type RecordView } from '@app/contracts';
import type { PanePlugin } from '../chart/pane-plugin';
import { breakRules } from '../chart/plugins/breaks';
import { levelLimit } from '../chart/plugins/limits';
import { lotMarks } from '../chart/plugins/lot-marks';

/** Breaks as rules without their words, for panes below the one that has the words. */
export const silentBreaks = (record: Pick<RecordView, 'breaks'>) =>
  breakRules(record.breaks.map(({ at }) => ({ at: Date.parse(at), words: null })));

/** The lots' scores about the baseline between the control limits. */
export function scorePlugins(record: RecordView): PanePlugin[] {
  const { limit, lots } = record;
  const word = (value: number) => {
    const text = `${value > 0 ? '+' : ''}${formatNumber(value, 1)}`;
    return { text: `control limit ${text}`, short: `limit ${text}` };
  };
  const limits =
    limit === null
      ? []
      : [limit, -limit].map((value) => levelLimit(value, { token: 'ink-soft', word, isDashed: true }));
  return [
    levelLimit(0, { token: 'baseline', word: () => ({ text: 'baseline', short: 'baseline' }) }),
    ...limits,
    silentBreaks(record),
    lotMarks(lots.map((lot) => ({ at: lot.at, value: lot.score, mark: lot.mark }))),
  ];
}

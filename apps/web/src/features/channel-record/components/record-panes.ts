import type { RecordLot, RecordView } from '@app/contracts';
import type { PanePlugin } from '../../../shared/chart/pane-plugin';
import type { Pane } from '../../../shared/chart/pane-stack';
import { band } from '../../../shared/chart/plugins/band';
import { breakRules } from '../../../shared/chart/plugins/breaks';
import { highlight } from '../../../shared/chart/plugins/highlight';
import { levelLimit, stepLimit } from '../../../shared/chart/plugins/limits';
import { lotMarks } from '../../../shared/chart/plugins/lot-marks';
import { readingColumns } from '../../../shared/chart/plugins/reading-columns';
import { stepsOf } from '../../../shared/chart/step-line';
import { breakWords, signed } from '../../../shared/record/record-words';
import { scorePlugins, silentBreaks } from '../../../shared/record/score-plugins';

/** The three panes of a channel's record. `shown` is the lot under the pointer, shaded through all of them. */
export function recordPanes(record: RecordView, shown: RecordLot | null): Pane[] {
  const { name, unit, resolution } = record.channel.characteristic;
  const marker: PanePlugin[] = shown === null ? [] : [highlight(shown.startsAt, shown.endsAt)];
  const leastHeight = 8 * resolution;
  return [
    {
      leastHeight,
      key: 'readings',
      unit: `${name}: readings less nominal, ${unit}`,
      share: 5,
      plugins: [...marker, ...readingPlugins(record)],
    },
    {
      leastHeight,
      key: 'means',
      unit: `Lot means less nominal, ${unit}`,
      share: 3,
      plugins: [...marker, ...meanPlugins(record)],
    },
    {
      key: 'scores',
      unit: 'Scores, σ',
      share: 3,
      leastHeight: 4,
      plugins: [...marker, ...scorePlugins(record)],
    },
  ];
}

const nominalLine = levelLimit(0, {
  token: 'rule-meaning',
  wordToken: 'ink-soft',
  word: () => ({ text: 'nominal', short: 'nominal' }),
  isIncidental: true,
});
function readingPlugins(record: RecordView): PanePlugin[] {
  return [
    nominalLine,
    readingColumns(record.readings),
    band(record.baseline, 'baseline', 'baseline, 95 % band', 'baseline'),
    breakRules(record.breaks.map((item) => ({ at: Date.parse(item.at), words: breakWords(item) }))),
  ];
}

function meanPlugins({ lots, channel, breaks }: RecordView): PanePlugin[] {
  const less = (lot: RecordLot, value: number | null) => (value === null ? null : value - lot.nominal);
  const limit = (of: (lot: RecordLot) => number | null) =>
    stepsOf(lots.map((lot) => ({ startsAt: lot.startsAt, endsAt: lot.endsAt, value: rounded(less(lot, of(lot))) })));
  const line = {
    token: 'ink' as const,
    word: (value: number) => {
      const text = signed(value, channel.characteristic.resolution);
      return { text: `specification ${text}`, short: `spec. ${text}` };
    },
  };
  return [
    nominalLine,
    stepLimit(
      limit((lot) => lot.lowerSpecification),
      line,
    ),
    stepLimit(
      limit((lot) => lot.upperSpecification),
      line,
    ),
    silentBreaks({ breaks }),
    lotMarks(lots.map((lot) => ({ at: lot.at, value: less(lot, lot.mean), mark: lot.mark }))),
  ];
}

/** Differences of decimal numbers, such as 42.4 − 42, are equal again once their last binary digits are cut. */
const rounded = (value: number | null) => (value === null ? null : Number(value.toPrecision(9)));

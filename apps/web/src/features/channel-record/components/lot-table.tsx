import { decimalsOf, formatNumber, type RecordLot } from '@app/contracts';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import type { TimeRange } from '../../../shared/chart/range';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Mark } from '../../../shared/ui/mark';
import { markWords } from '../../../shared/ui/mark-words';
import { When } from '../../../shared/ui/when';
import { limitsText, scoreText } from '../../../shared/record/record-words';
import type { ChannelRecord } from '../../../shared/record/use-channel-record';

const STEP = 50;

/** The figures of the panes as a table, newest lot first. */
export function LotTable({ record, range }: { record: ChannelRecord; range: TimeRange }) {
  const [count, setCount] = useState(STEP);
  const lots = record.lots.filter((lot) => lot.endsAt >= range.from && lot.startsAt <= range.to).reverse();
  const { unit, resolution } = record.channel.characteristic;
  if (lots.length === 0) return <EmptyNote>No lot lies in this range. Zoom out, or press 0 on the chart.</EmptyNote>;
  return (
    <>
      {record.lotCount !== undefined && record.lotCount > record.lots.length && (
        <p className="record-more soft">
          {record.lots.length} of {record.lotCount} lots are drawn and listed: all that stand out, and every so many of
          the others. Zoom in to see each.
        </p>
      )}
      <FoldingTable
        caption={`Lots of ${record.channel.name} in the shown range`}
        columns={columnsOf(unit, decimalsOf(resolution) + 1)}
        items={lots.slice(0, count)}
        keyOf={(lot) => lot.id}
      />
      {lots.length > count && (
        <p className="record-more">
          <Action kind="quiet" onPress={() => setCount(count + STEP)}>
            Show {Math.min(STEP, lots.length - count)} more of {lots.length} lots
          </Action>
        </p>
      )}
    </>
  );
}

function columnsOf(unit: string, decimals: number): FoldingColumn<RecordLot>[] {
  const number = (value: number | null) => (value === null ? '–' : formatNumber(value, decimals));
  const limits = (low: number | null, high: number | null) => limitsText(low, high, decimals) ?? '–';
  return [
    {
      name: 'Lot',
      isLead: true,
      cell: (lot) => (
        <>
          <Mark mark={lot.mark} isSilent /> <Link to={urls.lot(lot.id)}>{lot.number}</Link>
        </>
      ),
    },
    { name: 'Product', cell: (lot) => lot.product },
    { name: 'Begun', cell: (lot) => <When at={lot.startsAt} form="short" /> },
    { name: `Mean, ${unit}`, isNumber: true, cell: (lot) => number(lot.mean) },
    { name: `Baseline, ${unit}`, isNumber: true, cell: (lot) => number(lot.baseline) },
    { name: `Control limits, ${unit}`, isNumber: true, cell: (lot) => limits(lot.controlLow, lot.controlHigh) },
    {
      name: `Specification limits, ${unit}`,
      isNumber: true,
      cell: (lot) => limitsText(lot.lowerSpecification, lot.upperSpecification, decimals - 1) ?? 'none',
    },
    { name: 'Score', isNumber: true, cell: (lot) => scoreText(lot.score) },
    { name: 'Verdict', cell: (lot) => markWords(lot.mark) },
  ];
}

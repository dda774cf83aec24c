import type { BreakView, LotMark, RecordLot, RecordView } from '@app/contracts';
import type { BaselinePointRow, BreakRow, ReadingColumn, RecordLotRow, RecordSpan } from '@app/data';

/** Two-sided 95 % quantile of the normal distribution. */
const Z_95 = 1.959964;

/** Least and greatest a column, at the column's middle. */
export function readingSeries(columns: ReadingColumn[], span: RecordSpan): RecordView['readings'] {
  const width = (span.to.getTime() - span.from.getTime()) / span.columnCount;
  return {
    at: columns.map(({ column }) => Math.round(span.from.getTime() + (column + 0.5) * width)),
    low: columns.map(({ low }) => low),
    high: columns.map(({ high }) => high),
  };
}

/** The baseline with its band; a null value at each break parts the segments. */
export function baselineSeries(points: BaselinePointRow[], breaksAt: number[]): RecordView['baseline'] {
  const series: RecordView['baseline'] = { at: [], value: [], low: [], high: [] };
  const add = (at: number, value: number | null, halfWidth: number) => {
    series.at.push(at);
    series.value.push(value);
    series.low.push(value === null ? null : value - halfWidth);
    series.high.push(value === null ? null : value + halfWidth);
  };
  points.forEach((point, index) => {
    const former = points[index - 1];
    // width_bucket counts the first segment as 1: the break that ends segment s is breaksAt[s - 1].
    if (former && former.segment !== point.segment) add(breaksAt[former.segment - 1], null, 0);
    add(point.at.getTime(), point.value, Z_95 * point.standardError);
  });
  return series;
}

export function toRecordLot(row: RecordLotRow, mark: LotMark): RecordLot {
  return {
    id: row.id,
    number: row.number,
    product: row.product,
    startsAt: row.startsAt.getTime(),
    endsAt: row.endsAt.getTime(),
    at: row.at.getTime(),
    mean: row.mean,
    nominal: row.nominal,
    lowerSpecification: row.lower,
    upperSpecification: row.upper,
    baseline: row.baseline,
    controlLow: row.controlLow,
    controlHigh: row.controlHigh,
    score: row.score,
    mark,
  };
}

export const toBreakView = (row: BreakRow): BreakView => ({
  id: row.id,
  at: row.at.toISOString(),
  kind: row.kind,
  reason: row.reason,
  by: row.byName,
});

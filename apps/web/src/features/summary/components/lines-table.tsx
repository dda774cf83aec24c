import type { DecidedMeasure, SummaryLine, SummaryView, WeekFigures } from '@app/contracts';
import { Fragment, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { type Figure as FigureName, figureLink } from '../figure-links';
import { decidedParts, decidedWords, lastWeekWords, measureDetail } from '../summary-words';

interface Row {
  name: string;
  /** Null: all lines. */
  lineId: number | null;
  week: WeekFigures;
  lastWeek: WeekFigures | null;
}

const rowOf = ({ line, week, lastWeek }: SummaryLine): Row => ({ name: line.name, lineId: line.id, week, lastWeek });

/** Lots of the week by line, last week beside. */
export function LinesTable({ summary }: { summary: SummaryView }) {
  const rows = summary.lines.map(rowOf);
  if (rows.length !== 1) rows.push({ name: 'All lines', lineId: null, ...summary.total });
  const { startsOn } = summary.week;
  const lotsOf = (row: Row, figure: FigureName) => figureLink(figure, row.lineId, startsOn);
  return (
    <Sheet
      title="Lots by line"
      isFlush
      margin={
        <p>
          A lot is of the week in which it ended. The lists behind the figures show the same lots as they are known now;
          readings that came later may have added some.
        </p>
      }
    >
      <FoldingTable
        caption="Lots of the week by line, last week beside"
        items={rows}
        keyOf={(row) => row.lineId ?? 0}
        columns={[
          { name: 'Line', isLead: true, cell: (row) => <b>{row.name}</b> },
          {
            name: 'Measured',
            cell: (row) => (
              <Figure
                to={lotsOf(row, 'measured')}
                count={row.week.measured.lots}
                detail={measureDetail(row.week.measured)}
                before={row.lastWeek?.measured.lots}
              />
            ),
          },
          {
            name: 'Scored',
            cell: (row) => (
              <Figure to={lotsOf(row, 'scored')} count={row.week.scored.lots} before={row.lastWeek?.scored.lots} />
            ),
          },
          {
            name: 'Not scored on a channel',
            cell: (row) => (
              <Figure
                to={lotsOf(row, 'notFullyScored')}
                count={row.week.notFullyScored}
                before={row.lastWeek?.notFullyScored}
              />
            ),
          },
          {
            name: 'Held',
            cell: (row) => (
              <Figure
                to={lotsOf(row, 'held')}
                count={row.week.held.lots}
                detail={measureDetail(row.week.held)}
                before={row.lastWeek?.held.lots}
              />
            ),
          },
          {
            name: 'Decided',
            cell: (row) => (
              <>
                <Decided decided={row.week.decided} to={(disposition) => lotsOf(row, { disposition })} />
                {row.lastWeek !== null && (
                  <span className="summary__before">last week: {decidedWords(row.lastWeek.decided)}</span>
                )}
              </>
            ),
          },
          {
            name: 'Open at the week’s end',
            cell: (row) => (
              <Figure
                to={lotsOf(row, 'stillOpen')}
                count={row.week.stillOpen.lots}
                detail={measureDetail(row.week.stillOpen)}
                before={row.lastWeek?.stillOpen.lots}
              />
            ),
          },
        ]}
      />
    </Sheet>
  );
}

interface FigureProps {
  count: number;
  detail?: string;
  before: number | null | undefined;
  to?: string;
}

/** A count that leads to what is counted, what it comes to, and last week's. */
function Figure({ count, detail = '', before, to }: FigureProps) {
  return (
    <>
      {linked(count, to)}
      {detail !== '' && <span className="summary__detail">{detail}</span>}
      <span className="summary__before">{lastWeekWords(before)}</span>
    </>
  );
}

/** "3 released, 1 scrapped", each with its lots behind it. */
function Decided({
  decided,
  to,
}: {
  decided: readonly DecidedMeasure[];
  to: (disposition: DecidedMeasure['disposition']) => string;
}) {
  const parts = decidedParts(decided);
  if (parts.length === 0) return <>none</>;
  return parts.map(({ disposition, words }, index) => (
    <Fragment key={disposition}>
      {index > 0 && ', '}
      <Link to={to(disposition)}>{words}</Link>
    </Fragment>
  ));
}

function linked(count: number, to: string | undefined): ReactNode {
  if (to === undefined || count === 0) return <span className="number">{count}</span>;
  return <Link to={to}>{count}</Link>;
}

import type { SummaryLine, SummaryView, WeekFigures } from '@app/contracts';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { urls, type LotFilters } from '../../../app/urls';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { decidedWords, lastWeekWords, measureDetail } from '../summary-words';
import { lastDay } from '../week';

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
  const lotsOf = (row: Row, filters: LotFilters = {}) =>
    urls.lots({ line: row.lineId, from: startsOn, to: lastDay(startsOn), ...filters });
  return (
    <Sheet
      title="Lots by line"
      isFlush
      margin={
        <p>
          The lists behind the figures go by when a lot started; one that ran over midnight on Sunday may stand in the
          week beside.
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
                to={lotsOf(row)}
                count={row.week.measured.lots}
                detail={measureDetail(row.week.measured)}
                before={row.lastWeek?.measured.lots}
              />
            ),
          },
          {
            name: 'Scored',
            cell: (row) => <Figure count={row.week.scored.lots} before={row.lastWeek?.scored.lots} />,
          },
          {
            name: 'Not scored on a channel',
            cell: (row) => (
              <Figure
                to={lotsOf(row, { state: 'not_scored' })}
                count={row.week.notFullyScored}
                before={row.lastWeek?.notFullyScored}
              />
            ),
          },
          {
            name: 'Held',
            cell: (row) => (
              <Figure
                to={lotsOf(row, { held: 'ever' })}
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
                {linked(
                  decidedWords(row.week.decided),
                  row.week.decided.length > 0 ? urls.lots({ line: row.lineId, held: 'decided' }) : undefined,
                )}
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
                to="#open-holds"
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

function linked(count: number | string, to: string | undefined): ReactNode {
  if (to === undefined || count === 0) return <span className="number">{count}</span>;
  if (to.startsWith('#')) return <a href={to}>{count}</a>;
  return <Link to={to}>{count}</Link>;
}

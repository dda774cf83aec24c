import { useMemo, useState } from 'react';
import { useParams, useSearchParams } from 'react-router-dom';
import { clampRange, isSameRange, type TimeRange } from '../../../shared/chart/range';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { Action, ActionLink } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { PageHeading } from '../../../shared/ui/page-heading';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { urls } from '../../../app/urls';
import { columnsFor, parseRange, withMargin } from '../api/record-range';
import { useChannelRecord, type ChannelRecord } from '../../../shared/record/use-channel-record';
import { BreakForm } from '../components/break-form';
import { LotTable } from '../components/lot-table';
import { RecordChart } from '../components/record-chart';
import { RecordMargin } from '../components/record-margin';
import '../components/channel-record.css';

/** What did this gauge and this process do? */
export function ChannelRecordPage() {
  const channelId = Number(useParams().channelId);
  const [search] = useSearchParams();
  const [columns] = useState(() => columnsFor(window.innerWidth));
  const asked = parseRange(search.get('from'), search.get('to'));
  const newest = useChannelRecord(channelId, null, columns);
  const zoomed = useChannelRecord(channelId, asked && withMargin(asked), 2 * columns, asked !== null);
  const record = (asked === null ? newest.data : zoomed.data) ?? newest.data;
  useShowsLine(record?.channel.lineId, record?.channel.plantId);
  const failed = newest.isError ? newest : zoomed.isError ? zoomed : null;

  if (record === undefined || newest.data === undefined) {
    return (
      <>
        <PageHeading title="Channel record" />
        <Sheet>
          {failed === null ? (
            <Skeleton lines={14} label="Loading the record" />
          ) : (
            <ProblemNotice
              problem={failed.error}
              what="The record could not be loaded."
              onRetry={() => void failed.refetch()}
            />
          )}
        </Sheet>
      </>
    );
  }
  const home = { from: newest.data.from, to: newest.data.to };
  return (
    <>
      {failed !== null && (
        <ProblemNotice
          problem={failed.error}
          what="This range could not be loaded; the last picture is shown."
          onRetry={() => void failed.refetch()}
        />
      )}
      <Record key={channelId} record={record} asked={asked} home={home} />
    </>
  );
}

function Record({ record, asked, home }: { record: ChannelRecord; asked: TimeRange | null; home: TimeRange }) {
  const { can } = useSession();
  const [, setSearch] = useSearchParams();
  const [isDeclaring, setIsDeclaring] = useState(false);
  const { channel, extent } = record;
  const bounds = useMemo(() => extent && roomFor(extent, home), [extent, home]);
  const range = useMemo(() => {
    const wanted = asked ?? home;
    return bounds === null ? wanted : clampRange(wanted, bounds);
  }, [asked, home, bounds]);

  const showRange = (next: TimeRange) =>
    setSearch(
      (before) => {
        const after = new URLSearchParams(before);
        for (const end of ['from', 'to'] as const) {
          if (isSameRange(next, home)) after.delete(end);
          else after.set(end, String(Math.round(next[end])));
        }
        return after;
      },
      { replace: true, preventScrollReset: true },
    );

  return (
    <>
      <PageHeading
        title={`${channel.name}, ${channel.lineName}`}
        lead={
          channel.gauge === null ? 'No gauge serves this channel now.' : `Measured by ${channel.gauge.assetNumber}.`
        }
        tools={
          <>
            <ActionLink kind="quiet" to={urls.plans(channel.id)}>
              Plan
            </ActionLink>
            {can('declare_break') && !isDeclaring && (
              <Action kind="quiet" onPress={() => setIsDeclaring(true)}>
                Declare a break
              </Action>
            )}
          </>
        }
      />
      {isDeclaring && (
        <Sheet title="Declare a break">
          <BreakForm channel={channel} suggestedAt={range.to} onDone={() => setIsDeclaring(false)} />
        </Sheet>
      )}
      <Sheet margin={<RecordMargin channel={channel} />}>
        {bounds === null ? (
          <EmptyNote>
            This channel has no readings yet. They come with the next workbook that holds {channel.characteristic.name}.
          </EmptyNote>
        ) : (
          <RecordChart record={record} range={range} home={home} bounds={bounds} onRange={showRange} />
        )}
      </Sheet>
      {bounds !== null && (
        <Sheet title="The same figures" isFlush>
          <LotTable record={record} range={range} />
        </Sheet>
      )}
    </>
  );
}

/** The record's extent, widened to hold the first view. */
const roomFor = (extent: TimeRange, home: TimeRange): TimeRange => ({
  from: Math.min(extent.from, home.from),
  to: Math.max(extent.to, home.to),
});

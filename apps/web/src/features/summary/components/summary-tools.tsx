import type { SummaryRequested, SummaryView } from '@app/contracts';
import { useMutation } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useMakeSummary, useSummaries } from '../api/summaries';
import { isAwaited, madeId, underWayOf } from '../week';
import { NotMade } from './not-made';

const MAKE_ANEW = 'Make it anew';

/** What can be done with a week's summary. */
export function SummaryTools({ summary }: { summary: SummaryView }) {
  return (
    <>
      <DownloadWorkbook summary={summary} />
      <Action kind="quiet" onPress={() => window.print()}>
        Print
      </Action>
      {summary.maySend && <MakeAnew summary={summary} />}
    </>
  );
}

function DownloadWorkbook({ summary }: { summary: SummaryView }) {
  const toast = useToast();
  const downloading = useMutation({
    mutationFn: () => download(`/summaries/${summary.id}/workbook`, `summary-${summary.week.startsOn}.xlsx`),
    onError: toast.failed,
  });
  return (
    <Action kind="quiet" isBusy={downloading.isPending} onPress={() => downloading.mutate()}>
      {downloading.isPending ? 'Writing the workbook…' : 'Download the workbook'}
    </Action>
  );
}

/** Makes a new version from what is known now, sends it if asked to, and goes there. */
function MakeAnew({ summary }: { summary: SummaryView }) {
  const [awaited, setAwaited] = useState<SummaryRequested | null>(null);
  const making = useMakeSummary(summary.plant.id, setAwaited);
  const list = useSummaries(summary.plant.id, awaited).data;
  const navigate = useNavigate();
  const newId = awaited === null ? undefined : madeId(list?.items, awaited);
  useEffect(() => {
    if (newId !== undefined) void navigate(urls.summary(newId));
  }, [newId, navigate]);
  const isUnderWay = underWayOf(list, summary.week.startsOn)?.state === 'being_made';
  const make = (send: boolean) => making.mutate({ weekStartsOn: summary.week.startsOn, send });
  if (making.isPending || isUnderWay || isAwaited(list, awaited)) {
    return (
      <Action kind="quiet" isBusy>
        A new version is being made…
      </Action>
    );
  }
  return (
    <>
      <Action kind="quiet" onPress={() => make(false)}>
        {MAKE_ANEW}
      </Action>
      <Action onPress={() => make(true)}>Make it anew and send</Action>
    </>
  );
}

/** That a newer version of this week was asked for and could not be made. */
export function NewVersionFailed({ summary }: { summary: SummaryView }) {
  const item = underWayOf(useSummaries(summary.plant.id).data, summary.week.startsOn);
  if (item?.state !== 'failed') return null;
  return <NotMade failed={item} askAgain={summary.maySend ? MAKE_ANEW : null} />;
}

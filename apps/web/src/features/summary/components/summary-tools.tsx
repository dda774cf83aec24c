import type { SummaryRequested, SummaryView } from '@app/contracts';
import { useMutation } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useMakeSummary, useSendSummary, useSummaries } from '../api/summaries';
import { isMade } from '../week';

/** What can be done with a week's summary. */
export function SummaryTools({ summary }: { summary: SummaryView }) {
  return (
    <>
      <DownloadWorkbook summary={summary} />
      <Action kind="quiet" onPress={() => window.print()}>
        Print
      </Action>
      {summary.maySend && (
        <>
          <MakeAnew summary={summary} />
          <Send summary={summary} />
        </>
      )}
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

/** Makes a new version from what is known now, and goes there. */
function MakeAnew({ summary }: { summary: SummaryView }) {
  const [awaited, setAwaited] = useState<SummaryRequested | null>(null);
  const making = useMakeSummary(summary.plant.id, setAwaited);
  const made = useSummaries(summary.plant.id, awaited).data?.items;
  const navigate = useNavigate();
  const newId =
    awaited !== null && isMade(made, awaited)
      ? made?.find((item) => item.weekStartsOn === awaited.weekStartsOn)?.id
      : undefined;
  useEffect(() => {
    if (newId !== undefined) void navigate(urls.summary(newId));
  }, [newId, navigate]);
  const isBusy = making.isPending || awaited !== null;
  return (
    <Action kind="quiet" isBusy={isBusy} onPress={() => making.mutate({ weekStartsOn: summary.week.startsOn })}>
      {isBusy ? 'Being made…' : 'Make it anew'}
    </Action>
  );
}

function Send({ summary }: { summary: SummaryView }) {
  const sending = useSendSummary(summary.id);
  return (
    <Action isBusy={sending.isPending} onPress={() => sending.mutate()}>
      {sending.isPending ? 'Sending…' : 'Send'}
    </Action>
  );
}

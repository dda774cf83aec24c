import type { SummaryRequested, SummaryView } from '@app/contracts';
import { useMutation } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useMakeSummary, useSummaries } from '../api/summaries';
import { madeId } from '../week';

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
  const made = useSummaries(summary.plant.id, awaited).data?.items;
  const navigate = useNavigate();
  const newId = awaited === null ? undefined : madeId(made, awaited);
  useEffect(() => {
    if (newId !== undefined) void navigate(urls.summary(newId));
  }, [newId, navigate]);
  const isBusy = making.isPending || awaited !== null;
  const make = (send: boolean) => making.mutate({ weekStartsOn: summary.week.startsOn, send });
  if (isBusy) {
    return (
      <Action kind="quiet" isBusy>
        A new version is being made…
      </Action>
    );
  }
  return (
    <>
      <Action kind="quiet" onPress={() => make(false)}>
        Make it anew
      </Action>
      <Action onPress={() => make(true)}>Make it anew and send</Action>
    </>
  );
}

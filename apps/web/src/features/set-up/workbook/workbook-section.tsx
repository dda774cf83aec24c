import { useMutation } from '@tanstack/react-query';
import { download } from '../../../shared/api/download';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useToast } from '../../../shared/ui/toast';
import { useWorkbook } from './use-workbook';
import { WorkbookDrop } from './workbook-drop';
import { WorkbookOutcome } from './workbook-outcome';
import './workbook.css';

/** The whole set-up in one workbook: take it out, change it in Excel, see what it would do, apply it. */
export function WorkbookSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  if (!can('set_up_plant'))
    return (
      <Sheet>
        <EmptyNote>
          The whole set-up as one workbook would be here; an administrator takes it out and brings it in.
        </EmptyNote>
      </Sheet>
    );
  return (
    <>
      <Download plantId={plantId} />
      <Upload plantId={plantId} />
    </>
  );
}

function Download({ plantId }: { plantId: number }) {
  const toast = useToast();
  const path = `/plants/${plantId}/set-up/workbook`;
  const taking = useMutation({ mutationFn: () => download(path, 'set-up.xlsx'), onError: toast.failed });
  return (
    <Sheet
      title="The set-up as it is"
      margin={<p>For a plant that is still empty it holds the empty sheets, ready to be filled in.</p>}
    >
      <div className="set-up-download">
        <p>
          One Excel workbook with a sheet each for the plant, shifts, lines, products, characteristics, specifications,
          gauges, channels and people. Its first sheet says what every column wants.
        </p>
        <Action kind="quiet" isBusy={taking.isPending} onPress={() => taking.mutate()}>
          {taking.isPending ? 'Writing the workbook…' : 'Download the workbook'}
        </Action>
      </div>
    </Sheet>
  );
}

function Upload({ plantId }: { plantId: number }) {
  const workbook = useWorkbook(plantId);
  const { file, view, doing, error } = workbook;
  return (
    <Sheet
      title="Bring a workbook in"
      margin={
        <>
          <p>A workbook is applied as a whole or not at all, and every change has its entry in the audit.</p>
          <p>Nothing is removed by it: what has no row stays as it is. Only a shift calendar is replaced as a whole.</p>
        </>
      }
    >
      <div className="set-up-workbook">
        <WorkbookDrop isDisabled={doing !== 'nothing'} onFile={(chosen) => void workbook.check(chosen)} />
        {doing === 'checking' && view === null && (
          <Skeleton lines={4} label={`Checking ${file?.name ?? 'the workbook'}`} />
        )}
        {error !== null && <ProblemNotice problem={error} what="The workbook was not taken in." />}
        {view !== null && file !== null && <WorkbookOutcome fileName={file.name} view={view} workbook={workbook} />}
      </div>
    </Sheet>
  );
}

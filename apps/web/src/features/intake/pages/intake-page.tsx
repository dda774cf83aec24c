import type { IntakeView } from '@app/contracts';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { useSession } from '../../../shared/session/session';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { Action } from '../../../shared/ui/action';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useToast } from '../../../shared/ui/toast';
import { When } from '../../../shared/ui/when';
import { useIntake } from '../api/use-intakes';
import { useLineChannels } from '../api/use-line-channels';
import { FirstRows } from '../components/first-rows';
import { FoundLots } from '../components/found-lots';
import { STATE_WORDS } from '../components/intake-words';
import { Problems } from '../components/problems';
import { StatusSheet } from '../components/status-sheet';
import { FileGrid } from '../corrections/file-grid';
import { ReadingBar } from '../corrections/reading-bar';
import { useDraft } from '../corrections/use-draft';
import '../components/intake.css';

/** One workbook: what was recognised, every problem, what will happen or came of it. */
export function IntakePage() {
  const intakeId = Number(useParams().intakeId);
  const query = useIntake(intakeId);
  useShowsLine(query.data?.line.id, query.data?.plantId);
  return (
    <Loaded
      query={query}
      failure="The intake could not be loaded."
      skeleton={
        <>
          <PageHeading title="Intake" />
          <Sheet>
            <Skeleton lines={8} label="Loading the intake" />
          </Sheet>
        </>
      }
    >
      {(intake) => <Intake key={intake.id} intake={intake} />}
    </Loaded>
  );
}

function Intake({ intake }: { intake: IntakeView }) {
  const draft = useDraft(intake);
  const channels = useLineChannels(intake.line.id);
  const { can } = useSession();
  const isRead = intake.grids.length > 0 || intake.layout !== null;
  const isOpen = intake.state === 'needs_attention' && can('upload_intake');
  return (
    <>
      <PageHeading
        title={`${intake.fileName}: ${STATE_WORDS[intake.state]}`}
        lead={
          <>
            For <Link to={urls.intakes(intake.line.id)}>{intake.line.name}</Link>, received from {intake.receivedBy} on{' '}
            <When at={intake.receivedAt} />.
          </>
        }
        tools={isRead && <MarkedWorkbook intake={intake} />}
      />
      <StatusSheet intake={intake} draft={draft} />
      {intake.problemCounts.length > 0 && (
        <Sheet title="Problems">
          <Problems intake={intake} />
        </Sheet>
      )}
      {isRead && (
        <>
          {intake.grids.length > 0 && (
            <Sheet title={GRID_TITLES[isOpen ? 'open' : 'closed']} isFlush margin={<ReadingMargin intake={intake} />}>
              {intake.grids.map((grid) => (
                <FileGrid key={grid.sheet} grid={grid} draft={draft} channels={channels} isOpen={isOpen} />
              ))}
              <ReadingBar draft={draft} />
            </Sheet>
          )}
          <Sheet title="The first readings, as Ebbline reads them" isFlush>
            <FirstRows readings={intake.firstRows} />
          </Sheet>
          <Sheet title="Lots found" isFlush>
            <FoundLots lots={intake.lots} />
          </Sheet>
        </>
      )}
    </>
  );
}

const GRID_TITLES = { open: 'How it is read: correct it here', closed: 'How it was read' };

/** What holds for the whole file. */
function ReadingMargin({ intake: { text } }: { intake: IntakeView }) {
  return (
    <>
      <p>These are the sheet’s own first rows. Above each column stands what it is read as.</p>
      {text !== null && (
        <p>
          A text file: {text.encoding}, columns separated by {SEPARATORS[text.separator] ?? `“${text.separator}”`}
          {text.decimalSign !== null && `, decimal ${text.decimalSign === ',' ? 'comma' : 'point'}`}.
        </p>
      )}
    </>
  );
}

const SEPARATORS: Record<string, string> = { ',': 'commas', ';': 'semicolons', '\t': 'tabs', '|': 'bars' };

/** The workbook with the problem cells marked, to be mended and sent again. */
function MarkedWorkbook({ intake }: { intake: IntakeView }) {
  const toast = useToast();
  const [isBusy, setIsBusy] = useState(false);
  const fetchIt = async () => {
    setIsBusy(true);
    try {
      await download(`/intakes/${intake.id}/workbook`, `marked-${intake.fileName}`);
    } catch (error) {
      toast.failed(error);
    } finally {
      setIsBusy(false);
    }
  };
  return (
    <Action kind="quiet" isBusy={isBusy} onPress={() => void fetchIt()}>
      Download the marked workbook
    </Action>
  );
}

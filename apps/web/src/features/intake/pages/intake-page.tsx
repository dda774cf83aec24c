import type { IntakeView } from '@app/contracts';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { Action } from '../../../shared/ui/action';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useToast } from '../../../shared/ui/toast';
import { When } from '../../../shared/ui/when';
import { useIntake } from '../api/use-intakes';
import { FoundLots } from '../components/found-lots';
import { STATE_WORDS } from '../components/intake-words';
import { Problems } from '../components/problems';
import { Recognised } from '../components/recognised';
import { StatusSheet } from '../components/status-sheet';
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
  const isRead = intake.layout !== null;
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
      <StatusSheet intake={intake} />
      {intake.problemCounts.length > 0 && (
        <Sheet title="Problems">
          <Problems intake={intake} />
        </Sheet>
      )}
      {isRead && (
        <>
          <Sheet title={`What was recognised: ${LAYOUTS[intake.layout ?? 'long']}`} isFlush>
            <Recognised intake={intake} />
          </Sheet>
          <Sheet title="Lots found" isFlush>
            <FoundLots lots={intake.lots} />
          </Sheet>
        </>
      )}
    </>
  );
}

const LAYOUTS = { long: 'a row a reading', wide: 'a column a channel' };

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

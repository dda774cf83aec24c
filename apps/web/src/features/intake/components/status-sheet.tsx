import type { IntakeView } from '@app/contracts';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { ActionLink } from '../../../shared/ui/action';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { isMoving } from '../api/use-intakes';
import { useIntakeProgress } from '../api/use-intake-progress';
import { Questions } from '../corrections/questions';
import { ReadingBar } from '../corrections/reading-bar';
import type { Draft } from '../corrections/use-draft';
import { Confirm } from './confirm';
import { accountingWords, counted } from './intake-words';
import { IntakeMargin } from './intake-margin';
import { Outcome } from './outcome';
import { ProgressLine } from './progress-line';
import { SettledChanges } from './settled-changes';
import { Withdraw } from './withdraw';

/** How the intake stands, and the one thing to do about it. */
export function StatusSheet({ intake, draft }: { intake: IntakeView; draft: Draft }) {
  const { can } = useSession();
  const progress = useIntakeProgress(intake.id, isMoving(intake.state));
  return (
    <Sheet title={TITLES[intake.state]} margin={<IntakeMargin intake={intake} />}>
      {intake.failure !== null && (
        <div className="problem" role="alert">
          <p className="problem__why">{intake.failure}</p>
        </div>
      )}
      {isMoving(intake.state) && intake.failure === null && <ProgressLine state={intake.state} progress={progress} />}
      {intake.state === 'refused' && <Refused intake={intake} />}
      {intake.state === 'needs_attention' && <Attention intake={intake} draft={draft} />}
      {intake.state === 'scored' && <Outcome intake={intake} />}
      {intake.state === 'scored' && <SettledChanges intake={intake} />}
      {intake.withdrawal !== null && (
        <p>
          Withdrawn by {intake.withdrawal.by} on <When at={intake.withdrawal.at} />: {intake.withdrawal.reason}
        </p>
      )}
      {intake.rowsRead > 0 && <p className="accounting">{accountingWords(intake)}.</p>}
      {intake.isWithdrawable && can('upload_intake') && <Withdraw intake={intake} />}
    </Sheet>
  );
}

const TITLES: Record<IntakeView['state'], string> = {
  received: 'Being read',
  needs_attention: 'What will happen',
  queued: 'Queued',
  working: 'Being scored',
  scored: 'What came of it',
  refused: 'Refused',
  withdrawn: 'Withdrawn',
};

function Refused({ intake }: { intake: IntakeView }) {
  return (
    <p className="intake-actions">
      Nothing of it was used. Mend the workbook and send it again.{' '}
      <ActionLink kind="quiet" to={urls.intakes(intake.line.id)}>
        Upload another workbook
      </ActionLink>
    </p>
  );
}

function Attention({ intake, draft }: { intake: IntakeView; draft: Draft }) {
  const { can } = useSession();
  const mayAnswer = can('upload_intake');
  const asked = new Set(intake.questions.map(({ code }) => code));
  const blocking = intake.problemCounts
    .filter((item) => item.severity === 'blocking' && !asked.has(item.code))
    .reduce((sum, item) => sum + item.count, 0);
  return (
    <>
      {intake.questions.length > 0 && (
        <>
          <p>
            {counted(intake.questions.length, 'question')} only a person can answer. The answer is remembered for
            workbooks with the same header on {intake.line.name}.
          </p>
          <Questions intake={intake} draft={draft} isOpen={mayAnswer} />
        </>
      )}
      {blocking > 0 && (
        <p>
          {counted(blocking, 'problem')} below must be put right first: say on the sheet below how it is to be read, or
          mend the workbook and upload it again; the marked copy shows the cells.
        </p>
      )}
      {!intake.isConfirmable && blocking === 0 && intake.questions.length === 0 && (
        <p>It cannot be confirmed as it stands: there is no reading in it.</p>
      )}
      {intake.isConfirmable && draft.changes === 0 && <Confirm intake={intake} />}
      {!intake.isConfirmable && (
        <p className="intake-actions">
          <ActionLink kind="quiet" to={urls.intakes(intake.line.id)}>
            Upload a corrected workbook
          </ActionLink>
        </p>
      )}
      <ReadingBar draft={draft} />
    </>
  );
}

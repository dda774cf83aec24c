import type { IntakeView } from '@app/contracts';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { Action, ActionLink } from '../../../shared/ui/action';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { useConfirmIntake, isMoving } from '../api/use-intakes';
import { useIntakeProgress } from '../api/use-intake-progress';
import { accountingWords, counted } from './intake-words';
import { IntakeMargin } from './intake-margin';
import { Outcome } from './outcome';
import { ProgressLine } from './progress-line';

/** How the intake stands, and the one thing to do about it. */
export function StatusSheet({ intake }: { intake: IntakeView }) {
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
      {intake.state === 'needs_attention' && <Attention intake={intake} />}
      {intake.state === 'scored' && <Outcome intake={intake} />}
      {intake.rowsRead > 0 && <p className="accounting">{accountingWords(intake)}.</p>}
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

function Attention({ intake }: { intake: IntakeView }) {
  const { can } = useSession();
  const confirm = useConfirmIntake(intake.id);
  const lots = counted(intake.lots.length, 'lot');
  const blocking = intake.problemCounts
    .filter((item) => item.severity === 'blocking')
    .reduce((sum, item) => sum + item.count, 0);
  if (!intake.isConfirmable) {
    return (
      <>
        <p>
          {blocking > 0
            ? `${counted(blocking, 'problem')} below must be mended first. Correct the workbook and upload it again; the marked copy shows the cells.`
            : 'It cannot be confirmed as it stands.'}
        </p>
        <p className="intake-actions">
          <ActionLink kind="quiet" to={urls.intakes(intake.line.id)}>
            Upload the corrected workbook
          </ActionLink>
        </p>
      </>
    );
  }
  return (
    <>
      <p>
        Its readings will be stored and {lots} scored; lots that do not fit are held and the line is told by mail.
        Nothing is stored before you confirm.
      </p>
      {can('upload_intake') ? (
        <p className="intake-actions">
          <Action isBusy={confirm.isPending || confirm.isSuccess} onPress={() => confirm.mutate()}>
            Confirm and score {lots}
          </Action>
        </p>
      ) : (
        <p className="soft">An engineer or the quality manager confirms it.</p>
      )}
      {confirm.isError && <ProblemNotice problem={confirm.error} what="The intake was not confirmed." />}
    </>
  );
}

import type { ConfirmIntakeRequest, IntakeView } from '@app/contracts';
import { useState } from 'react';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { useConfirmIntake } from '../api/use-intakes';
import { Comparison } from './comparison';
import { counted } from './intake-words';

/** What confirming does, and where readings are stored already: what becomes of them. */
export function Confirm({ intake }: { intake: IntakeView }) {
  const { can } = useSession();
  const confirm = useConfirmIntake(intake.id);
  const [differing, setDiffering] = useState<ConfirmIntakeRequest['differing']>('keep');
  const { comparison } = intake;
  const lots = counted(intake.lots.length, 'lot');
  const hasDiffering = (comparison?.readingsDiffering ?? 0) > 0;
  const isRepeat = comparison !== null && comparison.overlaps.length > 0;
  return (
    <>
      {isRepeat && <Comparison comparison={comparison} />}
      <p>
        Its readings will be stored and {lots} scored; lots that do not fit are held and the line is told by mail.
        Nothing is stored before you confirm.
      </p>
      {!can('upload_intake') && <p className="soft">An engineer or the quality manager confirms it.</p>}
      {can('upload_intake') && (
        <>
          {hasDiffering && (
            <fieldset className="confirm-choice">
              <legend className="field__label">Readings with another value than the stored one</legend>
              <label className="choice">
                <input
                  type="radio"
                  name="differing"
                  checked={differing === 'keep'}
                  onChange={() => setDiffering('keep')}
                />
                The stored values stand; this workbook’s are not used.
              </label>
              <label className="choice">
                <input
                  type="radio"
                  name="differing"
                  checked={differing === 'supersede'}
                  onChange={() => setDiffering('supersede')}
                />
                This workbook corrects them: its values supersede the stored ones, which are kept as superseded, and
                what was judged with them is judged again.
              </label>
            </fieldset>
          )}
          <p className="intake-actions">
            <Action
              isBusy={confirm.isPending || confirm.isSuccess}
              onPress={() => confirm.mutate(hasDiffering ? { differing } : {})}
            >
              Confirm and score {lots}
            </Action>
          </p>
        </>
      )}
      {confirm.isError && <ProblemNotice problem={confirm.error} what="The intake was not confirmed." />}
    </>
  );
}

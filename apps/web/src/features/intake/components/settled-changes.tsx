import type { IntakeView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { useRejudgeSettled, useSettledChanges } from '../api/use-settled-changes';
import { counted } from './intake-words';

/** Settled verdicts that would be another one with what this workbook brought late: judged again only when somebody asks. */
export function SettledChanges({ intake }: { intake: IntakeView }) {
  const { can } = useSession();
  const { data: changes = [] } = useSettledChanges(intake.id);
  const rejudge = useRejudgeSettled(intake.id);
  if (changes.length === 0) return null;
  return (
    <div className="settled-changes">
      <p>
        {counted(changes.length, 'settled verdict', 'settled verdicts')} would be another one with these readings. A
        settled verdict stays until somebody asks; both are kept.
      </p>
      <ul className="comparison__list">
        {changes.map(({ lotId, lotNumber, channel, now, would }) => (
          <li key={`${lotId} ${channel.id}`}>
            Lot {lotNumber} in {channel.name}: {now}; it would be {would}.
          </li>
        ))}
      </ul>
      {can('upload_intake') && (
        <p className="intake-actions">
          <Action kind="quiet" isBusy={rejudge.isPending || rejudge.isSuccess} onPress={() => rejudge.mutate()}>
            Judge {counted(changes.length, 'settled verdict', 'settled verdicts')} again
          </Action>
        </p>
      )}
      {rejudge.isError && <ProblemNotice problem={rejudge.error} what="The verdicts were not judged again." />}
    </div>
  );
}

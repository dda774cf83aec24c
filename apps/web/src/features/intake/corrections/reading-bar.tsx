import { Action } from '../../../shared/ui/action';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { counted } from '../components/intake-words';
import type { Draft } from './use-draft';

/** Sends the corrections; until then nothing on the page has changed but the choices. */
export function ReadingBar({ draft }: { draft: Draft }) {
  if (draft.changes === 0 && !draft.isBusy && draft.error === null) return null;
  return (
    <div className="reading-bar" role="region" aria-label="Corrections">
      {(draft.changes > 0 || draft.isBusy) && (
        <p className="intake-actions">
          <Action isBusy={draft.isBusy} onPress={() => draft.send()}>
            Read it again with {counted(draft.changes, 'correction')}
          </Action>
          <Action kind="plain" isDisabled={draft.isBusy} onPress={draft.discard}>
            Leave it as it was
          </Action>
        </p>
      )}
      {draft.error !== null && !draft.isBusy && (
        <ProblemNotice problem={draft.error} what="The workbook was not read again." />
      )}
    </div>
  );
}

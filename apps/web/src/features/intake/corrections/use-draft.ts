import type { IntakeView, WorkbookAnswers } from '@app/contracts';
import { mergeAnswers } from '@app/contracts';
import { useState } from 'react';
import { useReadAgain } from '../api/use-intakes';
import { countChanges } from './corrections';

/** Corrections that were made on the page and not sent yet. */
export interface Draft {
  answers: WorkbookAnswers;
  changes: number;
  isBusy: boolean;
  error: unknown;
  change: (answers: WorkbookAnswers) => void;
  discard: () => void;
  /** Has the workbook read again by the draft, with `more` merged into it. */
  send: (more?: WorkbookAnswers) => void;
}

export function useDraft(intake: IntakeView): Draft {
  const readAgain = useReadAgain(intake.id);
  const [draft, setDraft] = useState<WorkbookAnswers | null>(null);
  const answers = draft ?? intake.answers;
  return {
    answers,
    changes: draft === null ? 0 : countChanges(intake.answers, draft),
    isBusy: readAgain.isPending,
    error: readAgain.error,
    change: setDraft,
    discard: () => setDraft(null),
    send: (more) =>
      readAgain.mutate(more === undefined ? answers : mergeAnswers(answers, more), { onSuccess: () => setDraft(null) }),
  };
}

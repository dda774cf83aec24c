import { useState } from 'react';
import { asProblem } from '../../../shared/api/client';
import { Action } from '../../../shared/ui/action';

interface EndQuestionProps {
  /** What ends, and what stays. */
  sentence: string;
  words: string;
  onConfirm: () => Promise<unknown>;
  onDone: () => void;
}

/** Asked only where something ends, or begins again. */
export function EndQuestion({ sentence, words, onConfirm, onDone }: EndQuestionProps) {
  const [isBusy, setIsBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const confirm = async () => {
    setIsBusy(true);
    try {
      await onConfirm();
      onDone();
    } catch (error) {
      setProblem(asProblem(error).detail);
      setIsBusy(false);
    }
  };
  return (
    <div className="inline-form">
      <p className="inline-form__note">{sentence}</p>
      {problem !== null && (
        <p className="form__error" role="alert">
          {problem}
        </p>
      )}
      <div className="form__actions">
        <Action kind="quiet" isBusy={isBusy} onPress={() => void confirm()}>
          {words}
        </Action>
        <Action kind="plain" onPress={onDone}>
          Leave it
        </Action>
      </div>
    </div>
  );
}

/** In place of the question, where something else must end first. */
export function Hindrance({ sentence, onDone }: Pick<EndQuestionProps, 'sentence' | 'onDone'>) {
  return (
    <div className="inline-form">
      <p className="inline-form__note">{sentence}</p>
      <div className="form__actions">
        <Action kind="quiet" onPress={onDone}>
          Leave it
        </Action>
      </div>
    </div>
  );
}

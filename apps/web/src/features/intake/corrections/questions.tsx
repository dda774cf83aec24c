import type { IntakeView } from '@app/contracts';
import { useState } from 'react';
import { Action } from '../../../shared/ui/action';
import { counted } from '../components/intake-words';
import type { Draft } from './use-draft';

/** What only a person can say: each question with its choices; the workbook is read again by what is chosen. */
export function Questions({ intake, draft, isOpen }: { intake: IntakeView; draft: Draft; isOpen: boolean }) {
  return (
    <ol className="questions">
      {intake.questions.map(({ code, sheet, column, detail, rows, choices }) => (
        <li key={`${code} ${sheet} ${column ?? ''} ${detail}`}>
          <p>
            {detail}{' '}
            {rows > 1 && <span className="soft">It is about {counted(rows, 'row')}; one answer holds for all.</span>}
          </p>
          {isOpen && code === 'date-missing' && <DayAnswer draft={draft} />}
          {isOpen && choices.length > 0 && (
            <p className="intake-actions">
              {choices.map((choice) => (
                <Action
                  key={choice.label}
                  kind="quiet"
                  isDisabled={draft.isBusy}
                  onPress={() => draft.send(choice.answers)}
                >
                  {choice.label}
                </Action>
              ))}
            </p>
          )}
        </li>
      ))}
    </ol>
  );
}

/** The day on which times without a date begin, where the workbook does not say it. */
function DayAnswer({ draft }: { draft: Draft }) {
  const [day, setDay] = useState(draft.answers.date ?? '');
  return (
    <form
      className="intake-actions day-answer"
      onSubmit={(event) => {
        event.preventDefault();
        if (day !== '') draft.send({ date: day });
      }}
    >
      <label>
        <span className="soft">They began on </span>
        <input type="date" required value={day} onChange={(event) => setDay(event.currentTarget.value)} />
      </label>
      <Action kind="quiet" type="submit" isDisabled={draft.isBusy || day === ''}>
        Read it with this day
      </Action>
    </form>
  );
}

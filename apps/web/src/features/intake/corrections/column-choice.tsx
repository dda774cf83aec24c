import { type ColumnAnswer, ROLE_WORDS } from '@app/contracts';
import { answerOf, choiceOf, OFFERED_ROLES } from './corrections';

interface ColumnChoiceProps {
  /** "column D of Night". */
  name: string;
  answer: ColumnAnswer | undefined;
  channels: { id: number; name: string; unit: string }[];
  isDisabled: boolean;
  onChange: (answer: ColumnAnswer) => void;
}

/** What one column is read as: its purpose, for values also their unit and whether they are deviations. */
export function ColumnChoice({ name, answer, channels, isDisabled, onChange }: ColumnChoiceProps) {
  const now: ColumnAnswer = answer ?? { role: 'ignored' };
  const isOfValues = now.role === 'channel_values' || now.role === 'value';
  return (
    <div className="column-choice">
      <select
        aria-label={`What ${name} is`}
        value={choiceOf(now)}
        disabled={isDisabled}
        onChange={(event) => onChange(answerOf(event.currentTarget.value, answer))}
      >
        <optgroup label="Values of a channel">
          {channels.map(({ id, name: channel }) => (
            <option key={id} value={`channel ${id}`}>
              {channel}
            </option>
          ))}
        </optgroup>
        <optgroup label="Other columns">
          {OFFERED_ROLES.map((role) => (
            <option key={role} value={role}>
              {ROLE_WORDS[role]}
            </option>
          ))}
        </optgroup>
      </select>
      {isOfValues && (
        <span className="column-choice__values">
          <input
            key={now.unit ?? ''}
            aria-label={`Unit of ${name}`}
            placeholder={channels.find(({ id }) => id === now.channelId)?.unit || 'unit'}
            defaultValue={now.unit ?? ''}
            disabled={isDisabled}
            size={5}
            maxLength={20}
            onBlur={(event) => {
              const unit = event.currentTarget.value.trim();
              if (unit !== (now.unit ?? '')) onChange({ ...now, unit: unit === '' ? undefined : unit });
            }}
          />
          <label>
            <input
              type="checkbox"
              checked={now.isDeviation ?? false}
              disabled={isDisabled}
              onChange={(event) => onChange({ ...now, isDeviation: event.currentTarget.checked || undefined })}
            />{' '}
            from nominal
          </label>
        </span>
      )}
    </div>
  );
}

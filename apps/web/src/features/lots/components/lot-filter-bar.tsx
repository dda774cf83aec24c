import { notScoredSentence } from '@app/contracts';
import { Dropdown } from 'primereact/dropdown';
import { InputText } from 'primereact/inputtext';
import { useEffect, useId, useState } from 'react';
import type { LotFilters } from '../../../app/urls';
import { useLine } from '../../../shared/line-context/line-context';
import { Action } from '../../../shared/ui/action';
import { DISPOSITION_CHOICES, HELD_CHOICES, isNarrowed, STATE_CHOICES, TIME_CHOICES, UNNARROWED } from '../filters';

interface LotFilterBarProps {
  filters: LotFilters;
  onChange: (next: Partial<LotFilters>) => void;
}

export function LotFilterBar({ filters, onChange }: LotFilterBarProps) {
  const { lines } = useLine();
  const lineChoices = [
    { value: '', label: 'all lines' },
    ...lines.map((line) => ({ value: String(line.id), label: line.name })),
  ];
  return (
    <form className="filters" role="search" aria-label="Filter the lots" onSubmit={(event) => event.preventDefault()}>
      <LotText text={filters.text ?? ''} onChange={(text) => onChange({ text })} />
      <Choice
        label="Line"
        value={filters.line == null ? '' : String(filters.line)}
        choices={lineChoices}
        onChange={(value) => onChange({ line: value === '' ? null : Number(value) })}
      />
      <Choice
        label="Verdict or fate"
        value={filters.state ?? ''}
        choices={STATE_CHOICES}
        onChange={(state) => onChange({ state })}
      />
      <Choice label="Hold" value={filters.held ?? ''} choices={HELD_CHOICES} onChange={(held) => onChange({ held })} />
      <Choice label="Time" value={filters.by ?? ''} choices={TIME_CHOICES} onChange={(by) => onChange({ by })} />
      {(filters.by === 'decided' || filters.disposition != null) && (
        <Choice
          label="Decided"
          value={filters.disposition ?? ''}
          choices={DISPOSITION_CHOICES}
          onChange={(disposition) => onChange({ disposition })}
        />
      )}
      <Day label="From" value={filters.from} onChange={(from) => onChange({ from })} />
      <Day label="To" value={filters.to} onChange={(to) => onChange({ to })} />
      {isNarrowed(filters) && (
        <Action kind="plain" onPress={() => onChange(UNNARROWED)}>
          Take the filters away
        </Action>
      )}
      {filters.notScoredOn != null && (
        <p className="filters__note">
          Only lots without a score on one channel
          {filters.notScoredFor != null && `, since ${notScoredSentence(filters.notScoredFor)}`}.
        </p>
      )}
    </form>
  );
}

const TYPING_PAUSE_MS = 350;

/** Asks once typing pauses. */
function LotText({ text, onChange }: { text: string; onChange: (text: string) => void }) {
  const [draft, setDraft] = useState(text);
  const [inAddress, setInAddress] = useState(text);
  if (text !== inAddress) {
    setInAddress(text);
    setDraft(text);
  }
  useEffect(() => {
    if (draft === text) return;
    const timer = setTimeout(() => onChange(draft), TYPING_PAUSE_MS);
    return () => clearTimeout(timer);
  }, [draft, text, onChange]);
  return (
    <label className="filters__field filters__field--text">
      <span>Lot or product</span>
      <InputText type="search" value={draft} onChange={(event) => setDraft(event.target.value)} />
    </label>
  );
}

interface ChoiceProps {
  label: string;
  value: string;
  choices: { value: string; label: string }[];
  onChange: (value: string) => void;
}

function Choice({ label, value, choices, onChange }: ChoiceProps) {
  const inputId = useId();
  return (
    <div className="filters__field">
      <label htmlFor={inputId}>{label}</label>
      <Dropdown
        inputId={inputId}
        value={value}
        options={choices}
        optionLabel="label"
        optionValue="value"
        scrollHeight="320px"
        onChange={(event) => onChange(String(event.value))}
      />
    </div>
  );
}

function Day({
  label,
  value,
  onChange,
}: {
  label: string;
  value?: string | null;
  onChange: (day: string | null) => void;
}) {
  return (
    <label className="filters__field filters__field--day">
      <span>{label}</span>
      <InputText type="date" value={value ?? ''} onChange={(event) => onChange(event.target.value || null)} />
    </label>
  );
}

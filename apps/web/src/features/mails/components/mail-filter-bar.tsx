import { MAIL_STATES, type MailsView } from '@app/contracts';
import { Dropdown } from 'primereact/dropdown';
import { useId } from 'react';
import type { MailFilters } from '../filters';
import { kindWords, STATE_WORDS } from '../mail-words';

interface MailFilterBarProps {
  filters: MailFilters;
  kinds: MailsView['kinds'];
  onChange: (next: Partial<MailFilters>) => void;
}

const STATES = [
  { value: '', label: 'any' },
  ...MAIL_STATES.map((state) => ({ value: state, label: STATE_WORDS[state] })),
];

export function MailFilterBar({ filters, kinds, onChange }: MailFilterBarProps) {
  const known = filters.kind === null || kinds.includes(filters.kind) ? kinds : [...kinds, filters.kind];
  return (
    <form className="mails__filters" role="search" aria-label="Filter the mails" onSubmit={(e) => e.preventDefault()}>
      <Choice
        label="State"
        value={filters.state ?? ''}
        choices={STATES}
        onChange={(value) => onChange({ state: MAIL_STATES.find((state) => state === value) ?? null })}
      />
      <Choice
        label="About"
        value={filters.kind ?? ''}
        choices={[{ value: '', label: 'anything' }, ...known.map((kind) => ({ value: kind, label: kindWords(kind) }))]}
        onChange={(value) => onChange({ kind: value === '' ? null : value })}
      />
    </form>
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
    <div className="mails__filter">
      <label htmlFor={inputId}>{label}</label>
      <Dropdown
        inputId={inputId}
        value={value}
        options={choices}
        optionLabel="label"
        optionValue="value"
        onChange={(event) => onChange(String(event.value))}
      />
    </div>
  );
}

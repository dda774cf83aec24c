import { AUDIT_BY_EBBLINE, type AuditFilterChoices, nameInWords } from '@app/contracts';
import { Dropdown } from 'primereact/dropdown';
import { InputText } from 'primereact/inputtext';
import { useEffect, useId, useState } from 'react';
import { Action } from '../../../shared/ui/action';
import { type AuditFilters, isNarrowed } from '../filters';

interface AuditFilterBarProps {
  filters: AuditFilters;
  /** Undefined while they load: then only what is chosen stands there. */
  choices?: AuditFilterChoices;
  onChange: (next: Partial<AuditFilters>) => void;
}

const NOTHING: AuditFilterChoices = { people: [], kinds: [] };
const NO_FILTERS: AuditFilters = {
  person: null,
  kind: null,
  thing: null,
  action: null,
  from: null,
  to: null,
  text: null,
};

export function AuditFilterBar({ filters, choices = NOTHING, onChange }: AuditFilterBarProps) {
  const { person, kind, thing, action } = filters;
  const people = [
    { value: String(AUDIT_BY_EBBLINE), label: 'Ebbline itself' },
    ...choices.people.map(({ id, name }) => ({ value: String(id), label: name })),
  ];
  const kinds = choices.kinds.map((choice) => ({ value: choice.kind, label: nameInWords(choice.kind) }));
  const ofKind = choices.kinds.filter((choice) => kind == null || choice.kind === kind);
  const actions = [...new Set(ofKind.flatMap((choice) => choice.actions))].sort();
  return (
    <form
      className="audit__filters"
      role="search"
      aria-label="Filter the audit"
      onSubmit={(event) => event.preventDefault()}
    >
      <Words text={filters.text ?? ''} onChange={(text) => onChange({ text })} />
      <Choice
        label="Who"
        any="anybody"
        value={person == null ? '' : String(person)}
        choices={people}
        onChange={(value) => onChange({ person: value === '' ? null : Number(value) })}
      />
      <Choice
        label="Kind of thing"
        any="any"
        value={kind ?? ''}
        choices={kinds}
        onChange={(value) => onChange({ kind: value || null, thing: null, action: null })}
      />
      <Choice
        label="Action"
        any="any"
        value={action ?? ''}
        choices={actions.map((value) => ({ value, label: nameInWords(value) }))}
        onChange={(value) => onChange({ action: value || null })}
      />
      <Day label="From" value={filters.from} onChange={(from) => onChange({ from })} />
      <Day label="To" value={filters.to} onChange={(to) => onChange({ to })} />
      {kind && thing != null && (
        <Action kind="plain" onPress={() => onChange({ thing: null })}>
          Every {nameInWords(kind)}
        </Action>
      )}
      {isNarrowed(filters) && (
        <Action kind="plain" onPress={() => onChange(NO_FILTERS)}>
          Take the filters away
        </Action>
      )}
    </form>
  );
}

const TYPING_PAUSE_MS = 350;

/** Asks once typing pauses. */
function Words({ text, onChange }: { text: string; onChange: (text: string) => void }) {
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
    <label className="audit__filter">
      <span>Words in it, such as a lot</span>
      <InputText type="search" value={draft} onChange={(event) => setDraft(event.target.value)} />
    </label>
  );
}

interface ChoiceProps {
  label: string;
  /** How it reads when nothing is chosen. */
  any: string;
  value: string;
  choices: { value: string; label: string }[];
  onChange: (value: string) => void;
}

function Choice({ label, any, value, choices, onChange }: ChoiceProps) {
  const inputId = useId();
  const isKnown = value === '' || choices.some((choice) => choice.value === value);
  const options = [{ value: '', label: any }, ...choices, ...(isKnown ? [] : [{ value, label: nameInWords(value) }])];
  return (
    <div className="audit__filter">
      <label htmlFor={inputId}>{label}</label>
      <Dropdown
        inputId={inputId}
        value={value}
        options={options}
        optionLabel="label"
        optionValue="value"
        scrollHeight="320px"
        onChange={(event) => onChange(String(event.value))}
      />
    </div>
  );
}

interface DayProps {
  label: string;
  value?: string | null;
  onChange: (day: string | null) => void;
}

function Day({ label, value, onChange }: DayProps) {
  return (
    <label className="audit__filter audit__filter--day">
      <span>{label}</span>
      <InputText type="date" value={value ?? ''} onChange={(event) => onChange(event.target.value || null)} />
    </label>
  );
}

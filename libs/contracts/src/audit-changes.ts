export interface AuditChange {
  /** In words: "evidence version". */
  field: string;
  /** Null: there was none. */
  before: string | null;
  /** Null: there is none any more. */
  after: string | null;
}

type Leaves = Map<string, string>;

const INSTANT = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d+)?)?(Z|[+-]\d{2}:\d{2})$/;
const STATE_NAME = /^[a-z]+(_[a-z]+)+$/;

/**
 * What an audit entry changed, field by field in words, in the order in which the fields stand; what stayed the same is left out.
 * @param before,after what was kept of the thing: any JSON
 * @param instantText shows an instant (ISO 8601) to people, in the plant's zone
 */
export function changesOf(before: unknown, after: unknown, instantText: (iso: string) => string): AuditChange[] {
  const was = leavesOf(before, instantText);
  const is = leavesOf(after, instantText);
  const fields = [...new Set([...was.keys(), ...is.keys()])];
  return fields
    .map((field) => ({ field, before: was.get(field) ?? null, after: is.get(field) ?? null }))
    .filter((change) => change.before !== change.after);
}

/** A name of code as words: "isRobust" → "robust", "in_force" → "in force", "valid-from" → "valid from". */
export function nameInWords(name: string): string {
  const words = name
    .replaceAll(/([a-z\d])([A-Z])/g, '$1 $2')
    .replaceAll(/[_-]+/g, ' ')
    .trim()
    .toLowerCase();
  return words.replace(/^(is|has) (?=\S)/, '');
}

function leavesOf(value: unknown, instantText: (iso: string) => string): Leaves {
  const leaves: Leaves = new Map();
  collect(value, '', leaves, instantText);
  return leaves;
}

function collect(value: unknown, path: string, leaves: Leaves, instantText: (iso: string) => string): void {
  if (value === null || value === undefined) return;
  if (Array.isArray(value)) return collectList(value, path, leaves, instantText);
  if (typeof value === 'object') {
    for (const [name, inner] of Object.entries(value))
      collect(inner, under(path, nameInWords(name)), leaves, instantText);
    return;
  }
  leaves.set(path || 'value', leafText(value as string | number | boolean, instantText));
}

/** A list of plain values is one field; one of things that have a sentence or a name is told by these. */
function collectList(list: unknown[], path: string, leaves: Leaves, instantText: (iso: string) => string): void {
  const texts = list.map((item) => listItemText(item, instantText));
  if (texts.every((text) => text !== null)) {
    if (texts.length > 0) leaves.set(path || 'value', texts.join('; '));
    return;
  }
  list.forEach((item, index) => collect(item, under(path, String(index + 1)), leaves, instantText));
}

function listItemText(item: unknown, instantText: (iso: string) => string): string | null {
  if (typeof item !== 'object') return leafText(item as string | number | boolean, instantText);
  const { sentence, name } = (item ?? {}) as { sentence?: unknown; name?: unknown };
  if (typeof sentence === 'string') return sentence;
  return typeof name === 'string' && Object.keys(item ?? {}).length <= 2 ? name : null;
}

const under = (path: string, name: string) => (path === '' ? name : `${path}: ${name}`);

function leafText(value: string | number | boolean, instantText: (iso: string) => string): string {
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') return String(value).replaceAll('-', '\u2212');
  if (INSTANT.test(value)) return instantText(value);
  return STATE_NAME.test(value) ? value.replaceAll('_', ' ') : value;
}

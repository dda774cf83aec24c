import { InputError, quoted } from '../input-error';

/** Position of each column; -1 where it is absent. */
export interface Columns {
  t: number;
  y: number;
  w: number;
  lot: number;
  count: number;
}

const NAMES = ['t', 'y', 'w', 'lot'] as const;

/** @throws InputError for an unknown, doubled or missing column, and for a file that is not separated by commas */
export function readHeader(fields: readonly string[]): Columns {
  const names = fields.map((field) => field.trim());
  if (names.length === 1 && names[0] === '')
    throw new InputError('row 1: there is no header; columns are t,y[,w][,lot]');
  const separator = names.length === 1 ? [';', '\t', '|'].find((mark) => names[0].includes(mark)) : undefined;
  if (separator !== undefined) {
    const word = { ';': 'semicolons', '\t': 'tabs', '|': 'bars' }[separator];
    throw new InputError(`row 1: fields are separated by ${word}; write commas between them and a point in decimals`);
  }
  names.forEach((name, index) => {
    if (!NAMES.some((known) => known === name))
      throw new InputError(`row 1: unknown column ${quoted(name)}; columns are t,y[,w][,lot]`);
    if (names.indexOf(name) !== index) throw new InputError(`row 1: column ${quoted(name)} stands twice`);
  });
  const [t, y, w, lot] = NAMES.map((name) => names.indexOf(name));
  for (const name of ['t', 'y'])
    if (!names.includes(name)) throw new InputError(`row 1: column ${quoted(name)} is missing`);
  return { t, y, w, lot, count: names.length };
}

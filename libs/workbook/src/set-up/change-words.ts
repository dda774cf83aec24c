import { DateTime } from 'luxon';
import { ROLE_NAMES, type Role } from '@app/contracts';
import type { RowComparison, SheetComparison } from './compare-set-up';
import type { SetUpDocument, SheetKey } from './document';
import { type ColumnDefinition, sheetOf } from './sheets';

/** How a row is called: `Line "Coater 2"`. */
export function titleOf(sheet: SheetKey, row: object): string {
  const { identity, thing } = sheetOf(sheet);
  const names = identity.map((field) => `"${String((row as Record<string, unknown>)[field])}"`);
  return [thing[0].toUpperCase() + thing.slice(1), names.join(', ')].filter(Boolean).join(' ');
}

/** What happens to the rows of a sheet, a sentence each; a shift calendar is replaced whole, so that shifts without a row are told too. */
export function sheetSentences(
  { sheet, rows, left }: SheetComparison,
  documents: { present: SetUpDocument; wanted: SetUpDocument },
): string[] {
  const ending = sheet === 'shifts' && rows.length > 0 ? left : [];
  return [
    ...rows.flatMap((row) => changeSentence(sheet, row, documents) ?? []),
    ...ending.map((index) => `${titleOf(sheet, documents.present[sheet][index])} is not in the new calendar.`),
  ];
}

/** What happens to one row, in a sentence; null when nothing does. */
function changeSentence(
  sheet: SheetKey,
  { kind, index, presentIndex, fields }: RowComparison,
  documents: { present: SetUpDocument; wanted: SetUpDocument },
): string | null {
  if (kind === 'unchanged') return null;
  const row = documents.wanted[sheet][index] as unknown as Record<string, unknown>;
  const title = titleOf(sheet, row);
  const isSpecification = sheet === 'specifications';
  if (kind === 'added') {
    if (sheet === 'people') return `${title} is invited.`;
    return isSpecification
      ? `${title} is proposed, and holds once a second person has approved it.`
      : `${title} is added.`;
  }
  const old = documents.present[sheet][presentIndex!] as unknown as Record<string, unknown>;
  const zone = documents.wanted.plant[0].timeZone;
  const told = sheetOf(sheet)
    .columns.filter((column) => fields.includes(column.key))
    .map(
      (column) =>
        `${column.header} from ${valueText(old[column.key], column, zone)} to ${valueText(row[column.key], column, zone)}`,
    );
  return isSpecification
    ? `${title} is proposed anew: ${told.join(', ')}. It holds once a second person has approved it.`
    : `${title} changes: ${told.join(', ')}.`;
}

function valueText(value: unknown, { style, key }: ColumnDefinition, timeZone: string): string {
  if (value === null || value === '') return key === 'validFrom' ? 'the import on' : 'none';
  switch (style) {
    case 'yes_no':
      return value ? 'yes' : 'no';
    case 'stamp':
      return DateTime.fromMillis(value as number, { zone: timeZone }).toFormat('yyyy-MM-dd HH:mm');
    case 'roles':
      return (value as Role[]).map((role) => ROLE_NAMES[role]).join(', ');
    case 'list':
      return (value as string[]).join(', ') || 'none';
    case 'number':
      return `${value as number}`;
    default:
      return `"${value as string}"`;
  }
}

const ADDED: Partial<Record<SheetKey, string>> = { specifications: 'proposed', people: 'invited' };
const CHANGED: Partial<Record<SheetKey, string>> = { specifications: 'proposed anew' };

/** A sheet in a sentence: "3 lines added, 1 unchanged; 1 has no row and stays as it is." Null when there is nothing to say. */
export function sheetSummary({ sheet, rows, left }: SheetComparison): string | null {
  const { thing } = sheetOf(sheet);
  const count = (kind: RowComparison['kind']) => rows.filter((row) => row.kind === kind).length;
  const parts = [
    [count('added'), ADDED[sheet] ?? 'added'],
    [count('changed'), CHANGED[sheet] ?? 'changed'],
    [count('unchanged'), 'unchanged'],
  ].filter(([number]) => number !== 0) as [number, string][];
  const said = parts.map(([number, word], at) =>
    at === 0 ? `${number} ${number === 1 ? thing : pluralOf(thing)} ${word}` : `${number} ${word}`,
  );
  const isReplaced = sheet === 'shifts' && rows.length > 0;
  const stays =
    left.length === 0
      ? null
      : isReplaced
        ? `${left.length} not in the new calendar`
        : left.length === 1
          ? `1 ${said.length === 0 ? `${thing} ` : ''}has no row and stays as it is`
          : `${left.length} ${said.length === 0 ? `${pluralOf(thing)} ` : ''}have no row and stay as they are`;
  const sentence = [said.join(', '), stays].filter(Boolean).join('; ');
  return sentence === '' ? null : `${sentence[0].toUpperCase()}${sentence.slice(1)}.`;
}

const pluralOf = (thing: string): string => (thing === 'person' ? 'people' : `${thing}s`);

import { DomainError } from '@app/contracts';
import { insertAuditEntry, type Person, type Transaction } from '@app/data';

/** Who changes the set-up of which plant, when. */
export interface Change {
  plantId: number;
  person: Person;
  at: Date;
}

/** A refusal at one field of the request, in conflict with what is there. */
export function refusal(code: string, pointer: string, detail: string): DomainError {
  return new DomainError('conflict', code, detail, [{ pointer, code, detail }]);
}

/** A field that cannot be used, whatever is there. */
export function badField(code: string, pointer: string, detail: string): DomainError {
  return new DomainError('invalid', code, detail, [{ pointer, code, detail }]);
}

/** A thing of the plant that is not retired, asked for in a field. */
export function usable<T extends { plantId: number; isRetired: boolean }>(
  found: T | undefined,
  change: Change,
  what: string,
  pointer: string,
): T {
  if (found?.plantId !== change.plantId)
    throw badField(`unknown-${what}`, pointer, `The plant has no such ${what}. Choose one from its list.`);
  if (found.isRetired)
    throw refusal(
      `${what}-retired`,
      pointer,
      `This ${what} is retired. Choose another one, or bring it back into use.`,
    );
  return found;
}

/** The fields that a change wants other than they are, before and after; undefined when there are none. */
export function differences<T extends object>(
  now: T,
  wanted: { [K in keyof T]?: T[K] },
): { before: Partial<T>; after: Partial<T> } | undefined {
  const keys = (Object.keys(wanted) as (keyof T)[]).filter(
    (key) => wanted[key] !== undefined && wanted[key] !== now[key],
  );
  if (keys.length === 0) return undefined;
  const pick = (of: Partial<T>) => Object.fromEntries(keys.map((key) => [key, of[key]])) as Partial<T>;
  return { before: pick(now), after: pick(wanted) };
}

/** When a thing is or was retired by a change; undefined: it stays as it is. */
export function retiredAt(isRetired: boolean | undefined, at: Date): Date | null | undefined {
  if (isRetired === undefined) return undefined;
  return isRetired ? at : null;
}

export interface ChangedThing {
  kind: string;
  id: number;
  /** "line Coater 2". */
  title: string;
  /** Names of the fields in words. */
  words: Record<string, string>;
}

/** Writes what was changed of a thing: retired, brought back, or each field from what to what. */
export async function auditChanged(
  tx: Transaction,
  { plantId, person, at }: Change,
  thing: ChangedThing,
  { before, after }: { before: object; after: object },
): Promise<void> {
  const fields = Object.keys(after).filter((key) => key !== 'isRetired');
  const isRetired = (after as { isRetired?: boolean }).isRetired;
  const told = fields.map((key) => {
    const [from, to] = [before, after].map((of) => valueText((of as Record<string, unknown>)[key]));
    return `${thing.words[key] ?? key} from ${from} to ${to}`;
  });
  if (isRetired !== undefined) told.unshift(isRetired ? 'retired' : 'in use again');
  const only = told.length === 1 && isRetired !== undefined;
  const said = isRetired ? `retired ${thing.title}` : `brought ${thing.title} back into use`;
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: only ? (isRetired ? 'retire' : 'bring-back') : 'change',
    thingKind: thing.kind,
    thingId: thing.id,
    sentence: `${person.name} ${only ? said : `changed ${thing.title}: ${told.join(', ')}`}.`,
    before,
    after,
  });
}

/** Writes that a thing was added. */
export async function auditAdded(
  tx: Transaction,
  { plantId, person, at }: Change,
  thing: { kind: string; id: number; title: string },
  after: object,
): Promise<void> {
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'add',
    thingKind: thing.kind,
    thingId: thing.id,
    sentence: `${person.name} added ${thing.title}.`,
    after,
  });
}

function valueText(value: unknown): string {
  if (value === null || value === undefined) return 'none';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return typeof value === 'number' ? String(value) : (value as string);
}

/** The fields of `after` that differ from `before`; null when none does, and there is nothing to send. */
export function changedFields<T extends object>(before: T, after: T): Partial<T> | null {
  const names = (Object.keys(after) as (keyof T)[]).filter((name) => after[name] !== before[name]);
  if (names.length === 0) return null;
  return Object.fromEntries(names.map((name) => [name, after[name]])) as Partial<T>;
}

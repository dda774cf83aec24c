export type SortOrder = 1 | 0 | -1 | null | undefined;

/** "-startsAt" → descending by startsAt. */
export function sortOf(sort: string): { sortField: string; sortOrder: 1 | -1 } {
  return sort.startsWith('-') ? { sortField: sort.slice(1), sortOrder: -1 } : { sortField: sort, sortOrder: 1 };
}

export function sortText(field: string, order: SortOrder): string {
  return order === -1 ? `-${field}` : field;
}

import type { Database } from '@app/data';

/** Inserts a row and gives its id. */
export async function insertRow(db: Database, table: string, row: Record<string, unknown>): Promise<number> {
  const [{ id }] = await db<{ id: number }>(table)
    .insert(row as never)
    .returning('id');
  return id;
}

const DAY = 86_400_000;

/** From which day on specifications and gauges of the test plants are valid. */
export const LONG_AGO = new Date(Date.UTC(2020, 0, 1));

export const since = (at: Date = LONG_AGO) => `[${at.toISOString()},)`;
export const days = (count: number) => count * DAY;

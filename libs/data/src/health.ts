import type { Database } from './database';

/** Whether the database answers within the time. */
export async function isDatabaseReachable(db: Database, milliseconds: number): Promise<boolean> {
  try {
    await db.raw('select 1').timeout(milliseconds);
    return true;
  } catch {
    return false;
  }
}

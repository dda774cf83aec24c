import { type AuditEntry, insertAuditEntry } from './audit';
import { rows, type Transaction } from './database';

/** Writes what happened to a person's account into the trail of each plant where the person is somebody, or of none. */
export async function insertAccountEntry(
  tx: Transaction,
  personId: number,
  entry: Omit<AuditEntry, 'plantId' | 'thingKind' | 'thingId'>,
): Promise<void> {
  const plants = await rows<{ id: number }>(
    tx,
    `select distinct plant_id as id from memberships where person_id = :personId order by 1`,
    { personId },
  );
  const plantIds = plants.length > 0 ? plants.map((plant) => plant.id) : [null];
  for (const plantId of plantIds)
    await insertAuditEntry(tx, { ...entry, plantId, thingKind: 'person', thingId: personId });
}

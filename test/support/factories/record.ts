import type { Database } from '@app/data';
import { insertRow } from './insert';
import type { TestChannel, TestPlant } from './plant';

export async function insertBreak(
  db: Database,
  plant: TestPlant,
  channel: TestChannel,
  {
    at,
    reason = 'window wiped',
    correctsId,
    isWithdrawn = false,
  }: { at: string; reason?: string; correctsId?: number; isWithdrawn?: boolean },
): Promise<number> {
  return insertRow(db, 'breaks', {
    plant_id: plant.id,
    channel_id: channel.id,
    at: new Date(at),
    kind: 'adjustment',
    reason,
    declared_by: plant.people.engineer.id,
    declared_at: new Date('2026-03-11T09:00:00Z'),
    corrects_id: correctsId ?? null,
    is_withdrawn: isWithdrawn,
  });
}

/** Points of the drawn baseline, with a standard error of 0.1 each. */
export async function insertBaseline(
  db: Database,
  plant: TestPlant,
  channel: TestChannel,
  fitId: number,
  points: { at: Date | string; value: number }[],
): Promise<void> {
  await db.batchInsert(
    'baseline_points',
    points.map(({ at, value }) => ({
      plant_id: plant.id,
      channel_id: channel.id,
      at: new Date(at),
      value,
      standard_error: 0.1,
      fit_id: fitId,
    })),
    1000,
  );
}

import type { BreakKind } from '@app/contracts';
import { rows, type Queryable, type Transaction } from './database';

export async function insertBreak(
  tx: Transaction,
  declared: {
    plantId: number;
    channelId: number;
    at: Date;
    kind: BreakKind;
    reason: string;
    declaredBy: number;
    declaredAt: Date;
  },
): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into breaks (plant_id, channel_id, at, kind, reason, declared_by, declared_at)
     values (:plantId, :channelId, :at, :kind, :reason, :declaredBy, :declaredAt) returning id`,
    declared,
  );
  await updateInputsChanged(tx, [declared.channelId]);
  return row.id;
}

/** Says that what judging reads of these channels changed, so that a judgement under way is not recorded. */
export async function updateInputsChanged(tx: Transaction, channelIds: number[]): Promise<void> {
  await tx.raw('update channels set inputs_version = inputs_version + 1 where id = any(:channelIds)', { channelIds });
}

/** Channels on which a lot has readings. */
export async function listChannelIdsOfLot(db: Queryable, lotId: number): Promise<number[]> {
  const found = await rows<{ id: number }>(
    db,
    'select channel_id as id from lot_channels where lot_id = :lotId order by 1',
    { lotId },
  );
  return found.map((row) => row.id);
}

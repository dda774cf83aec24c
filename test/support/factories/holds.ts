import type { Disposition, SignalName } from '@app/contracts';
import type { Database } from '@app/data';
import { insertRow } from './insert';
import type { TestLot } from './lots';
import type { TestChannel, TestPlant } from './plant';

export interface CauseOptions {
  channel: TestChannel;
  verdictId: number;
  intakeId?: number;
  signal?: SignalName;
  sentence?: string;
}

/** An open hold of a lot with its causes; evidence version 1. */
export async function insertHold(
  db: Database,
  plant: TestPlant,
  hold: { lot: TestLot; causes: CauseOptions[]; openedAt?: Date | string; lineId?: number },
): Promise<number> {
  const openedAt = new Date(hold.openedAt ?? '2026-03-11T08:48:00Z');
  const id = await insertRow(db, 'holds', {
    plant_id: plant.id,
    line_id: hold.lineId ?? plant.lines[0].id,
    lot_id: hold.lot.id,
    state: 'open',
    opened_at: openedAt,
    is_late: false,
  });
  for (const cause of hold.causes)
    await db('hold_causes').insert({
      plant_id: plant.id,
      hold_id: id,
      channel_id: cause.channel.id,
      verdict_id: cause.verdictId,
      intake_id: cause.intakeId ?? null,
      signal: cause.signal ?? 'lot_mean',
      sentence: cause.sentence ?? 'lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ)',
      added_at: openedAt,
    });
  return id;
}

/** The manager's decision on the whole lot of 500. */
export async function insertDecision(
  db: Database,
  plant: TestPlant,
  decision: { holdId: number; disposition: Disposition; at?: Date | string; by?: { id: number; name: string } },
): Promise<void> {
  const by = decision.by ?? plant.people.manager;
  await db.transaction(async (tx) => {
    const [{ id }] = await tx<{ id: number }>('decisions')
      .insert({
        plant_id: plant.id,
        reason: 'measured again by hand',
        decided_by: by.id,
        printed_name: by.name,
        meaning: decision.disposition === 'release' ? 'released' : 'scrapped',
        decided_at: new Date(decision.at ?? '2026-03-11T10:00:00Z'),
      } as never)
      .returning('id');
    const whole = { plant_id: plant.id, decision_id: id, hold_id: decision.holdId };
    await tx('decision_holds').insert({ ...whole, evidence_version: 1 });
    await tx('decision_parts').insert({ ...whole, disposition: decision.disposition, quantity: 500 });
    await tx('holds').where({ id: decision.holdId }).update({ state: 'decided' });
  });
}

export async function insertSetAside(db: Database, plant: TestPlant, holdId: number): Promise<void> {
  await db('set_asides').insert({
    hold_id: holdId,
    plant_id: plant.id,
    place: 'bay 7',
    confirmed_by: plant.people.lead.id,
    confirmed_at: new Date('2026-03-11T09:00:00Z'),
  });
}

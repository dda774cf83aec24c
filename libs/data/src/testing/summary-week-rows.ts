import type { Disposition } from '@app/contracts';
import { insertIntake, insertLot, insertReadings, type TestLot } from '../../../../test/support/factories/lots';
import { insertPlan } from '../../../../test/support/factories/plans';
import { insertHold } from '../../../../test/support/factories/holds';
import { insertRow } from '../../../../test/support/factories/insert';
import { insertChannel, type TestChannel, type TestPlant } from '../../../../test/support/factories/plant';
import { insertFit, insertVerdict } from '../../../../test/support/factories/verdicts';
import type { Database } from '../database';

/** Numbers in [0, 1) that are the same every time (Park & Miller 1988, the minimal standard). */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

/** The newest fit of a channel's week says how far it had moved. */
export async function insertMovement(
  db: Database,
  plant: TestPlant,
  channelId: number,
  fit: { planId: number; at: string; movement: number | null; segmentStartsAt?: string },
): Promise<void> {
  await insertRow(db, 'fits', {
    plant_id: plant.id,
    channel_id: channelId,
    plan_revision_id: fit.planId,
    input_hash: Buffer.from('inputs'),
    method_version: '1',
    judged_at: new Date(fit.at),
    movement: fit.movement,
    segment_starts_at: fit.segmentStartsAt ? new Date(fit.segmentStartsAt) : null,
  });
}

/** A decision on a lot, part by part. */
export async function insertParts(
  db: Database,
  plant: TestPlant,
  holdId: number,
  at: Date,
  parts: { disposition: Disposition; quantity: number | null }[],
): Promise<void> {
  await db.transaction(async (tx) => {
    const id = await insertRow(tx, 'decisions', {
      plant_id: plant.id,
      reason: 'measured again by hand',
      decided_by: plant.people.manager.id,
      printed_name: 'manager',
      meaning: 'decided',
      decided_at: at,
    });
    const whole = { plant_id: plant.id, decision_id: id, hold_id: holdId };
    await tx('decision_holds').insert({ ...whole, evidence_version: 1 });
    await tx('decision_parts').insert(parts.map((part) => ({ ...whole, ...part })));
    await tx('holds').where({ id: holdId }).update({ state: 'decided' });
  });
}

/**
 * Some three weeks of two lines from `from` on, in no order that a query could be made for: lots of metres and kilograms or neither, of two
 * products of which one has a value, scored, not scored and not judged, held early and late, decided whole and in parts or not at all.
 */
export async function insertManyWeeks(
  db: Database,
  plant: TestPlant,
  from: Date,
  seed: number,
  lotCount = 120,
): Promise<void> {
  const random = seeded(seed);
  const other = await insertRow(db, 'products', {
    plant_id: plant.id,
    code: 'SEP-20',
    name: 'Separator 20',
    value_per_unit: 1.75,
  });
  const calender = await insertChannel(db, {
    plantId: plant.id,
    lineId: plant.lines[1].id,
    productId: plant.productId,
    by: plant.people,
    name: 'Thickness',
    unit: 'µm',
    resolution: 0.1,
    asset: 'CT-031',
    kind: 'laser gauge',
    nominal: 20,
    half: 2,
  });
  const channels = [...plant.channels, calender];
  const intakeId = await insertIntake(db, plant);
  const fits = new Map<number, number>();
  for (const channel of channels)
    fits.set(channel.id, await insertFit(db, plant, channel.id, await insertPlan(db, plant, channel)));
  for (let index = 0; index < lotCount; index++) {
    const line = plant.lines[index % 2];
    const startsAt = new Date(from.getTime() + Math.floor(random() * 21 * 86_400_000));
    const lot = await insertLot(db, plant, { number: String(30_000 + index), startsAt, lineId: line.id });
    if (random() < 0.5) await db('lots').where({ id: lot.id }).update({ product_id: other });
    if (random() < 0.3) await db('lots').where({ id: lot.id }).update({ quantity: 312.5, quantity_unit: 'kg' });
    else if (random() < 0.2) await db('lots').where({ id: lot.id }).update({ quantity: null, quantity_unit: null });
    const verdictId = await judge(
      db,
      plant,
      { lot, intakeId, fits, channels: channels.filter((channel) => channel.lineId === line.id) },
      random,
    );
    if (verdictId !== null && random() < 0.5)
      await hold(db, plant, { lot, channel: channels[index % 2 === 0 ? 0 : 2], verdictId, lineId: line.id }, random);
  }
}

interface Judged {
  lot: TestLot;
  channels: TestChannel[];
  intakeId: number;
  fits: Map<number, number>;
}

/** The verdict on the line's first channel, if the lot has one there. */
async function judge(
  db: Database,
  plant: TestPlant,
  { lot, channels, intakeId, fits }: Judged,
  random: () => number,
): Promise<number | null> {
  let first: number | null = null;
  for (const [index, channel] of channels.entries()) {
    if (random() < 0.1) continue;
    await insertReadings(db, plant, { channel, lot, intakeId }, [channel.nominal, channel.nominal + 0.1]);
    if (random() < 0.1) continue;
    const isUnscored = random() < 0.2;
    const id = await insertVerdict(
      db,
      plant,
      { channel, lot },
      {
        fitId: fits.get(channel.id) as number,
        score: isUnscored ? null : random() < 0.3 ? 4.3 : 0.5,
        notScoredReason: random() < 0.5 ? 'learning' : 'beyond_allowance',
        constantState: random() < 0.3 ? 'outside_control_limits' : 'within_control_limits',
      },
    );
    if (index === 0) first = id;
  }
  return first;
}

async function hold(
  db: Database,
  plant: TestPlant,
  place: { lot: TestLot; channel: TestChannel; verdictId: number; lineId: number },
  random: () => number,
): Promise<void> {
  const openedAt = new Date(place.lot.endsAt.getTime() + random() * 3 * 86_400_000);
  const { lot, lineId, channel, verdictId } = place;
  const holdId = await insertHold(db, plant, { lot, lineId, openedAt, causes: [{ channel, verdictId }] });
  if (random() < 0.3) return;
  const decidedAt = new Date(openedAt.getTime() + random() * 5 * 86_400_000);
  const [{ quantity }] = await db('lots').where({ id: lot.id }).select<{ quantity: number | null }[]>('quantity');
  const split = quantity !== null && random() < 0.4;
  await insertParts(
    db,
    plant,
    holdId,
    decidedAt,
    split
      ? [
          { disposition: 'release', quantity: quantity - 100 },
          { disposition: 'scrap', quantity: 100 },
        ]
      : [{ disposition: random() < 0.5 ? 'release' : 'rework', quantity }],
  );
}

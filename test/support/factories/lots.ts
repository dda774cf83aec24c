import type { Database } from '@app/data';
import { insertRow } from './insert';
import type { TestChannel, TestPlant } from './plant';

export interface TestLot {
  id: number;
  number: string;
  startsAt: Date;
  endsAt: Date;
}

/** A lot of two hours, of 500 m of the plant's product. */
export async function insertLot(
  db: Database,
  plant: TestPlant,
  lot: { number: string; startsAt: Date | string; lineId?: number; hours?: number },
): Promise<TestLot> {
  const startsAt = new Date(lot.startsAt);
  const endsAt = new Date(startsAt.getTime() + (lot.hours ?? 2) * 3_600_000);
  const id = await insertRow(db, 'lots', {
    plant_id: plant.id,
    line_id: lot.lineId ?? plant.lines[0].id,
    number: lot.number,
    product_id: plant.productId,
    quantity: 500,
    quantity_unit: 'm',
    starts_at: startsAt,
    ends_at: endsAt,
  });
  return { id, number: lot.number, startsAt, endsAt };
}

/** A scored intake of the line, confirmed by the engineer unless told otherwise; readings and causes name one. */
export async function insertIntake(
  db: Database,
  plant: TestPlant,
  intake: { state?: string; confirmedBy?: number; receivedBy?: number; receivedAt?: Date; failure?: string } = {},
): Promise<number> {
  const state = intake.state ?? 'scored';
  const isConfirmed = ['queued', 'working', 'scored'].includes(state);
  const at = intake.receivedAt ?? new Date('2026-03-11T06:00:00Z');
  return insertRow(db, 'intakes', {
    plant_id: plant.id,
    line_id: plant.lines[0].id,
    state,
    file_name: 'coater-2-early.xlsx',
    byte_count: 4,
    sha256: Buffer.from('bytes'),
    received_by: intake.receivedBy ?? plant.people.engineer.id,
    received_at: at,
    confirmed_by: isConfirmed ? (intake.confirmedBy ?? plant.people.engineer.id) : null,
    confirmed_at: isConfirmed ? at : null,
    readings_stored_at: state === 'scored' ? at : null,
    scored_at: state === 'scored' ? at : null,
    failure: intake.failure ?? null,
  });
}

/** Values of a lot on a channel, evenly from its start to its end, with what they come to in lot_channels. */
export async function insertReadings(
  db: Database,
  plant: TestPlant,
  place: { channel: TestChannel; lot: TestLot; intakeId: number },
  values: number[],
): Promise<void> {
  const { channel, lot, intakeId } = place;
  const step = values.length > 1 ? (lot.endsAt.getTime() - lot.startsAt.getTime()) / (values.length - 1) : 0;
  const times = values.map((_, index) => new Date(lot.startsAt.getTime() + index * step));
  await db('lot_channels').insert({
    plant_id: plant.id,
    line_id: channel.lineId,
    channel_id: channel.id,
    lot_id: lot.id,
    count: values.length,
    first_at: times[0],
    last_at: times.at(-1),
    mean_at: new Date((times[0].getTime() + times.at(-1)!.getTime()) / 2),
    mean: values.reduce((sum, value) => sum + value, 0) / values.length,
    sum_squares: 0,
    minimum: Math.min(...values),
    maximum: Math.max(...values),
    specification_id: channel.specificationId,
  });
  await db('intake_lots').insert({ plant_id: plant.id, channel_id: channel.id, lot_id: lot.id, intake_id: intakeId });
  await db.batchInsert(
    'readings',
    values.map((value, index) => ({
      plant_id: plant.id,
      channel_id: channel.id,
      lot_id: lot.id,
      intake_id: intakeId,
      measured_at: times[index],
      value,
      occurrence: 1,
    })),
    1000,
  );
}

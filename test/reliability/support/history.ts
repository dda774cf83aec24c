import { storeReadings, type Database, updateIntakeScored, updateIntakeStored } from '@app/data';
import { stageReadings, type SheetReading } from '../../../libs/data/src/testing/stage-readings';
import { makeWorkbook } from '../../../libs/workbook/src/testing/make-workbook';
import { insertIntake } from '../../support/factories/lots';
import { insertPlan } from '../../support/factories/plans';
import type { TestChannel, TestPlant } from '../../support/factories/plant';

const HOUR = 3_600_000;
const LOT_MS = 2 * HOUR;
const HISTORY_LOTS = 30;
const READINGS_A_LOT = 12;
/** Of the lots in the workbook, this one lies half a unit above its baseline; that is inside its specification. */
export const BAD_LOT = '24132';
/** The last lot of the history ends when the plan of the factories was approved. */
const PLAN_APPROVED_AT = Date.parse('2026-03-01T10:00:00Z');

/** Numbers between -1 and 1 that are the same in every run. */
function scatter(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return (2 * state) / 2_147_483_647 - 1;
  };
}

/** Readings of the numbered lots on a channel: a slow movement, a little scatter between lots, more between readings. */
function readingsOf(channel: TestChannel, from: number, count: number, shift = 0): SheetReading[] {
  const next = scatter(channel.id * 1000 + from + 1);
  const readings: SheetReading[] = [];
  for (let lot = from; lot < from + count; lot++) {
    const number = String(24_100 + lot);
    const startsAt = PLAN_APPROVED_AT + (lot - HISTORY_LOTS) * LOT_MS;
    const mean = channel.nominal + 0.1 * Math.sin(lot / 12) + 0.05 * next() + (number === BAD_LOT ? shift : 0);
    for (let index = 0; index < READINGS_A_LOT; index++)
      readings.push({
        lot: number,
        channelId: channel.id,
        at: startsAt + ((index + 0.5) * LOT_MS) / READINGS_A_LOT,
        value: Math.round(1000 * (mean + 0.15 * next())) / 1000,
      });
  }
  return readings;
}

/** Thirty lots on the plant's two channels, stored and not yet judged. */
export async function insertHistory(db: Database, plant: TestPlant): Promise<void> {
  const intakeId = await insertIntake(db, plant, { state: 'queued', confirmedBy: plant.people.engineer2.id });
  await db.transaction(async (tx) => {
    const history = plant.channels.flatMap((channel) => readingsOf(channel, 0, HISTORY_LOTS));
    const intake = { id: intakeId, plantId: plant.id, lineId: plant.lines[0].id, rowsRead: history.length };
    await tx('intakes').where({ id: intakeId }).update({ rows_read: history.length });
    await stageReadings(tx, intake, history);
    await updateIntakeStored(tx, intakeId, { ...(await storeReadings(tx, intake)), at: new Date(PLAN_APPROVED_AT) });
    await updateIntakeScored(tx, intakeId, new Date(PLAN_APPROVED_AT));
  });
}

/** A plan in force on each channel, approved as the history ended. */
export async function insertPlans(db: Database, plant: TestPlant): Promise<void> {
  for (const channel of plant.channels) await insertPlan(db, plant, channel);
}

/** Four lots after the history, one of them bad on coat weight; one row names a channel that is not there. */
export function workbookOf(plant: TestPlant): Buffer {
  const [weight, thickness] = plant.channels;
  const rows = [
    ...readingsOf(weight, HISTORY_LOTS, 4, 0.5).map((reading) => [reading, weight.name] as const),
    ...readingsOf(thickness, HISTORY_LOTS, 4).map((reading) => [reading, thickness.name] as const),
  ].map(([{ at, lot, value }, name]) => [new Date(at).toISOString(), lot, 'SEP-16', name, value]);
  return makeWorkbook({
    sheets: [
      {
        name: 'Readings',
        rows: [
          ['Time', 'Lot', 'Product', 'Characteristic', 'Value'],
          ...rows,
          [rows[0][0], '24130', 'SEP-16', 'Gloss', 7],
        ],
      },
    ],
  });
}

import type { TestApp } from '../app';
import { insertDecision, insertHold, insertSetAside } from './holds';
import { insertIntake, insertLot, insertReadings, type TestLot } from './lots';
import { insertPlan } from './plans';
import { insertPlant, type TestPlant } from './plant';
import { insertFit, insertVerdict } from './verdicts';

export interface TestShift {
  plant: TestPlant;
  intakeId: number;
  planId: number;
  /** 24117 is within; 24118 is held open; 24119 was held and released; 24120 is not scored; 24121 was held and scrapped. */
  lots: Record<'24117' | '24118' | '24119' | '24120' | '24121', TestLot>;
  holds: { open: number; released: number; scrapped: number };
}

/** Coater 2 on 10 and 11 March: five lots on coat weight, in each state that a list tells apart. The plan is at 3 σ. */
export async function insertShift(
  app: TestApp,
  plantOptions: Parameters<typeof insertPlant>[1] = {},
): Promise<TestShift> {
  const db = app.database;
  const plant = await insertPlant(db, plantOptions);
  const channel = plant.channels[0];
  const intakeId = await insertIntake(db, plant);
  const planId = await insertPlan(db, plant, channel);
  const fitId = await insertFit(db, plant, channel.id, planId);
  const lots = {} as TestShift['lots'];
  const judged = async (number: keyof typeof lots, startsAt: string, score: number | null, values: number[]) => {
    const lot = await insertLot(db, plant, { number, startsAt });
    lots[number] = lot;
    await insertReadings(db, plant, { channel, lot, intakeId }, values);
    const isOutside = Math.abs(score ?? 0) > 3;
    return insertVerdict(
      db,
      plant,
      { channel, lot },
      { fitId, score, signals: isOutside ? [{ signal: 'lot_mean', action: 'holds' }] : [] },
    );
  };
  await judged('24117', '2026-03-10T20:00:00Z', 0.5, [59.9, 60.2]);
  const held = await judged('24118', '2026-03-10T23:00:00Z', -4.3, [59.4, 59.7]);
  const released = await judged('24119', '2026-03-11T01:00:00Z', 3.4, [60.3, 60.4]);
  await judged('24120', '2026-03-11T06:30:00Z', null, [60, 60.1]);
  const scrapped = await judged('24121', '2026-03-11T08:30:00Z', 5.1, [60.5, 60.6]);
  const hold = (lot: TestLot, verdictId: number, openedAt: string) =>
    insertHold(db, plant, { lot, openedAt, causes: [{ channel, verdictId, intakeId }] });
  const holds = {
    open: await hold(lots['24118'], held, '2026-03-11T08:48:00Z'),
    released: await hold(lots['24119'], released, '2026-03-11T08:49:00Z'),
    scrapped: await hold(lots['24121'], scrapped, '2026-03-11T08:50:00Z'),
  };
  await insertSetAside(db, plant, holds.scrapped);
  await insertDecision(db, plant, { holdId: holds.released, disposition: 'release', at: '2026-03-11T10:00:00Z' });
  await insertDecision(db, plant, { holdId: holds.scrapped, disposition: 'scrap', at: '2026-03-11T11:00:00Z' });
  return { plant, intakeId, planId, lots, holds };
}

import type { BreakKind } from '@app/contracts';
import { lotNumberOf } from './lots';
import { movementsOf, type DemoMovement } from './movement';
import {
  FIRST_WIPE,
  PLANNED_BREAKS,
  PLANNED_LOTS,
  PROCESS_SHIFT,
  SECOND_WIPE,
  VISCOMETER_ADJUSTMENT,
  type Place,
} from './planted';
import { lotMeanSd, modelOf } from './scatter';
import { demoSchedule, HISTORY_SHIFTS, type DemoSchedule } from './schedule';
import type { DemoShift } from './types';

/** A break falls this long before the first reading of the lot that follows it, s: between two readings. */
const BREAK_LEAD = 30;

export interface DemoBreak {
  line: string;
  channel: string;
  at: number;
  kind: BreakKind;
  reason: string;
  /** E-mail of the person who declared it. */
  who: string;
}

export interface PlantedLot {
  line: string;
  channel: string;
  /** Lot number. */
  lot: string;
  shift: DemoShift;
  /** Of the lot mean, in the characteristic's unit and in lot-mean standard deviations; 0 where only single readings stray. */
  size: number;
  sizeInLotSds: number;
  strays: { reading: number; size: number }[];
  isOutsideSpecification: boolean;
  why: string;
}

export interface DemoTruth {
  schedule: DemoSchedule;
  badLots: PlantedLot[];
  breaks: DemoBreak[];
  /** Undeclared and lasting: from this lot on the process runs at another level. */
  processShift: { line: string; channel: string; at: number; firstLot: string; size: number; sizeInLotSds: number };
  movements: DemoMovement[];
}

const shiftAt = (schedule: DemoSchedule, place: Place): DemoShift =>
  [...schedule.shifts, ...schedule.further][HISTORY_SHIFTS + place.shift];

function lotStartsAt(schedule: DemoSchedule, line: string, place: Place): number {
  const { startsAt, endsAt } = shiftAt(schedule, place);
  return startsAt + ((place.lot - 1) * (endsAt - startsAt)) / modelOf(line).line.lotsPerShift;
}

function breaksIn(schedule: DemoSchedule): DemoBreak[] {
  return PLANNED_BREAKS.map(({ before, ...rest }) => ({
    ...rest,
    at: lotStartsAt(schedule, rest.line, before) - BREAK_LEAD,
  }));
}

function badLotsIn(schedule: DemoSchedule): PlantedLot[] {
  return PLANNED_LOTS.map(({ place, line, channel, strays = [], isOutsideSpecification, why, ...planned }) => {
    const sd = lotMeanSd(line, channel);
    const size = planned.size ?? (planned.sizeInLotSds ?? 0) * sd;
    const shift = shiftAt(schedule, place);
    const lot = lotNumberOf(line, shift.index, place.lot);
    return { line, channel, lot, shift, size, sizeInLotSds: size / sd, strays, isOutsideSpecification, why };
  });
}

/** The breaks that people at the plant declared, in time order, for six weeks that end at `endsAt` (s). */
export function demoBreaks(endsAt: number): DemoBreak[] {
  return breaksIn(demoSchedule(endsAt));
}

/** What was planted in the six weeks that end at `endsAt` (s) and in the two further shifts. */
export function truth(endsAt: number): DemoTruth {
  const schedule = demoSchedule(endsAt);
  const line = 'Calender 1';
  const channel = 'Thickness';
  const processShiftAt = lotStartsAt(schedule, line, PROCESS_SHIFT);
  const { sizeInLotSds } = PROCESS_SHIFT;
  return {
    schedule,
    badLots: badLotsIn(schedule),
    breaks: breaksIn(schedule),
    processShift: {
      line,
      channel,
      at: processShiftAt,
      firstLot: lotNumberOf(line, shiftAt(schedule, PROCESS_SHIFT).index, PROCESS_SHIFT.lot),
      size: sizeInLotSds * lotMeanSd(line, channel),
      sizeInLotSds,
    },
    movements: movementsOf({
      startsAt: schedule.startsAt,
      endsAt,
      firstWipeAt: lotStartsAt(schedule, 'Coater 2', FIRST_WIPE),
      secondWipeAt: lotStartsAt(schedule, 'Coater 2', SECOND_WIPE),
      adjustmentAt: lotStartsAt(schedule, 'Slurry 3', VISCOMETER_ADJUSTMENT),
      processShiftAt,
      processShiftSizeInLotSds: sizeInLotSds,
    }),
  };
}

/** Sum of a channel's movements at an instant (s), in the characteristic's unit; all of them, or one side's. */
export function movementAt(
  { movements }: DemoTruth,
  line: string,
  channel: string,
  at: number,
  belongsTo?: 'gauge' | 'process',
): number {
  let sum = 0;
  for (const movement of movements) {
    if (movement.line !== line || movement.channel !== channel) continue;
    if (belongsTo === undefined || movement.belongsTo === belongsTo) sum += movement.valueAt(at);
  }
  return sum;
}

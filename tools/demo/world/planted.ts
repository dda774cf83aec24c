import type { BreakKind } from '@app/contracts';

/** What is planted where. A place is a shift counted from the end of the six weeks (-1 their last one) and a lot in it, from 1. */
export interface Place {
  shift: number;
  lot: number;
}

export interface PlannedBreak {
  line: string;
  channel: string;
  /** The break lies just before this lot. */
  before: Place;
  kind: BreakKind;
  reason: string;
  who: string;
}

export interface PlannedLot {
  line: string;
  channel: string;
  place: Place;
  /** Of the lot mean, in lot-mean standard deviations; takes the place of the lot's own random effect. */
  sizeInLotSds?: number;
  /** The same in the characteristic's unit. */
  size?: number;
  /** Single readings that stand away from the rest: which of the lot's readings, and by how much in the unit. */
  strays?: { reading: number; size: number }[];
  isOutsideSpecification: boolean;
  why: string;
}

export const FIRST_WIPE: Place = { shift: -87, lot: 2 };
export const SECOND_WIPE: Place = { shift: -37, lot: 3 };
export const VISCOMETER_ADJUSTMENT: Place = { shift: -52, lot: 2 };
export const PROCESS_SHIFT: Place & { sizeInLotSds: number } = { shift: -25, lot: 1, sizeInLotSds: 2.6 };

export const PLANNED_BREAKS: PlannedBreak[] = [
  {
    line: 'Coater 2',
    channel: 'Coat weight',
    before: FIRST_WIPE,
    kind: 'adjustment',
    reason: 'Coating dust on the window of beta gauge MW-0217, wiped off with isopropanol.',
    who: 'engineer@marrowby.example',
  },
  {
    line: 'Slurry 3',
    channel: 'Viscosity',
    before: VISCOMETER_ADJUSTMENT,
    kind: 'adjustment',
    reason: 'Viscometer MW-0412 read low against the laboratory sample and was adjusted.',
    who: 'engineer2@marrowby.example',
  },
  {
    line: 'Coater 2',
    channel: 'Coat weight',
    before: SECOND_WIPE,
    kind: 'adjustment',
    reason: 'Coating dust on the window of beta gauge MW-0217 again, wiped off with isopropanol.',
    who: 'engineer@marrowby.example',
  },
];

/** Bad lots, in time order. None lies in the first twenty days, from which plans take their reference lots. */
export const PLANNED_LOTS: PlannedLot[] = [
  {
    line: 'Coater 2',
    channel: 'Web thickness',
    place: { shift: -62, lot: 3 },
    size: 1.75,
    isOutsideSpecification: true,
    why: 'Base film from a thick parent roll.',
  },
  {
    line: 'Calender 1',
    channel: 'Nip force',
    place: { shift: -58, lot: 1 },
    sizeInLotSds: -7.5,
    isOutsideSpecification: false,
    why: 'Hydraulic pressure fell until the accumulator was filled again.',
  },
  {
    line: 'Coater 2',
    channel: 'Coat weight',
    place: { shift: -39, lot: 2 },
    sizeInLotSds: -9,
    isOutsideSpecification: false,
    why: 'Slurry pump ran slow while the dirt on the window made every lot read heavy.',
  },
  {
    line: 'Slurry 3',
    channel: 'pH',
    place: { shift: -18, lot: 3 },
    strays: [
      { reading: 3, size: 0.52 },
      { reading: 6, size: -0.52 },
    ],
    isOutsideSpecification: true,
    why: 'Dispersant dosed in two gulps: two readings outside specification, the lot mean as ever.',
  },
  {
    line: 'Coater 2',
    channel: 'Coat weight',
    place: { shift: -1, lot: 2 },
    sizeInLotSds: -6.5,
    isOutsideSpecification: false,
    why: 'Die gap opened by too little after a stop.',
  },
  {
    line: 'Coater 2',
    channel: 'Web thickness',
    place: { shift: -1, lot: 4 },
    size: 1.75,
    isOutsideSpecification: true,
    why: 'Base film from a thick parent roll.',
  },
  {
    line: 'Coater 2',
    channel: 'Coat weight',
    place: { shift: 0, lot: 3 },
    sizeInLotSds: 6.5,
    isOutsideSpecification: false,
    why: 'Slurry pump ran fast after a change of filter.',
  },
  {
    line: 'Coater 2',
    channel: 'Oven exit temperature',
    place: { shift: 1, lot: 2 },
    sizeInLotSds: 7,
    isOutsideSpecification: false,
    why: 'Exhaust flap of the last oven zone stuck half closed.',
  },
];

import type { Role } from '@app/contracts';

export interface DemoPerson {
  email: string;
  name: string;
  role: Role;
  /** Names of the lines whose mail this person gets. */
  lines: string[];
}

export interface DemoProduct {
  code: string;
  name: string;
  /** Unit of a lot's quantity. */
  quantityUnit: string;
  /** What one such unit is worth, in the plant's currency. */
  valuePerUnit: number;
}

export interface DemoSpecification {
  nominal: number;
  lower: number;
  upper: number;
}

export interface DemoChannel {
  /** As it stands in workbooks; unique on the line. */
  name: string;
  /** `unit` is empty for a characteristic without one (pH). */
  characteristic: { name: string; unit: string; resolution: number };
  gauge: { assetNumber: string; kind: string; position: string };
  /** In a shift of 8 h; the gauge reads at an even interval, so a longer shift has more. */
  readingsPerShift: number;
  /** By product code. */
  specifications: Record<string, DemoSpecification>;
  /** Whether the specification limits hold for every reading as well as for the lot mean. */
  appliesToIndividuals: boolean;
  /** Movement of the baseline, in the characteristic's unit: notice, and the cap beyond which lots are not scored. */
  allowanceNotice: number;
  allowanceCap: number;
}

export interface DemoLine {
  name: string;
  products: DemoProduct[];
  channels: DemoChannel[];
  lotsPerShift: number;
  /** Number of the first lot of the six weeks; the lots count up from it. */
  firstLotNumber: number;
}

export interface DemoShiftHours {
  name: string;
  /** Wall-clock time in the plant's zone, HH:MM. */
  startsAt: string;
  endsAt: string;
}

export interface DemoPlant {
  name: string;
  timeZone: string;
  /** Of the products' values. */
  currency: string;
  shifts: DemoShiftHours[];
  lines: DemoLine[];
  people: DemoPerson[];
}

/** One shift on the calendar. Instants are seconds since 1970-01-01 UTC, here and in the whole of this folder. */
export interface DemoShift {
  /** 0 is the first shift of the six weeks, 125 their last; 126 and 127 are the two further shifts. */
  index: number;
  name: string;
  startsAt: number;
  endsAt: number;
}

export interface DemoLot {
  number: string;
  line: string;
  /** Product code. */
  product: string;
  quantity: number;
  quantityUnit: string;
  startsAt: number;
  /** The next lot begins here. */
  endsAt: number;
}

export interface DemoReading {
  at: number;
  /** Lot number. */
  lot: string;
  /** Product code. */
  product: string;
  quantity: number;
  /** Channel name. */
  channel: string;
  /** Rounded to the characteristic's resolution. */
  value: number;
}

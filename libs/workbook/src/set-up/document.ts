import type { Role } from '@app/contracts';

/** A plant's whole set-up as one workbook holds it: things name each other by name or code, as people do. */
export interface SetUpDocument {
  /** Exactly one. */
  plant: PlantRow[];
  shifts: ShiftRow[];
  lines: LineRow[];
  products: ProductRow[];
  characteristics: CharacteristicRow[];
  specifications: SpecificationRow[];
  gauges: GaugeRow[];
  channels: ChannelRow[];
  people: PersonRow[];
}

export type SheetKey = keyof SetUpDocument;

export interface PlantRow {
  name: string;
  /** IANA name. */
  timeZone: string;
  /** Three capital letters (ISO 4217), null: no values are stated. */
  currency: string | null;
  engineerMayRelease: boolean;
  /** Age of an open hold, h. */
  reminderManagerHours: number;
  reminderDirectorHours: number;
  /** Movement of a baseline, % of the tolerance. */
  allowanceNoticePercent: number;
  allowanceCapPercent: number;
}

export interface ShiftRow {
  name: string;
  /** Wall clock, HH:MM; an end at or before the start lies on the next day. */
  startsAt: string;
  endsAt: string;
  /** First day of the calendar, YYYY-MM-DD, the same for all of its shifts. */
  validFrom: string;
}

export interface LineRow {
  name: string;
}

export interface ProductRow {
  code: string;
  name: string;
  /** Of one unit of a lot's quantity, in the plant's currency. */
  valuePerUnit: number | null;
}

export interface CharacteristicRow {
  name: string;
  /** '' for one without, such as pH. */
  unit: string;
  /** Smallest step of an indication, in the unit. */
  resolution: number;
}

export interface SpecificationRow {
  /** Code. */
  product: string;
  /** Name. */
  characteristic: string;
  /** In the characteristic's unit, as are the limits. */
  nominal: number;
  lower: number | null;
  upper: number | null;
  appliesToIndividuals: boolean;
  /** Epoch ms, null: from the import on. */
  validFrom: number | null;
}

export interface GaugeRow {
  assetNumber: string;
  kind: string;
}

export interface ChannelRow {
  /** Name. */
  line: string;
  name: string;
  /** Name. */
  characteristic: string;
  /** Where the gauge stands. */
  position: string;
  /** Asset number of the gauge that serves now. */
  gauge: string | null;
  /** Epoch ms since when it serves. */
  gaugeSince: number | null;
}

export interface PersonRow {
  email: string;
  name: string;
  roles: Role[];
  /** Names of the lines that the person is assigned to. */
  lines: string[];
}

/** What is wrong, and where: `cell` is null when it concerns the whole sheet, `sheet` when it concerns the file. */
export interface SetUpProblem {
  sheet: string | null;
  /** Such as "B4". */
  cell: string | null;
  /** Stable, kebab-case. */
  code: string;
  /** A sentence: what is wrong. */
  what: string;
  /** A sentence: what to do. */
  whatToDo: string;
}

/** Where the cells of a document were read, so that what is found later can name them. */
export type SetUpPlaces = Record<SheetKey, { rows: number[]; columns: Record<string, string> }>;

export interface SetUpReading {
  /** Null when there are problems. */
  document: SetUpDocument | null;
  places: SetUpPlaces;
  /** What stops the workbook; at most a fixed number a sheet, then one that counts the rest. */
  problems: SetUpProblem[];
  /** What was not used or looks doubtful, and stops nothing. */
  notices: SetUpProblem[];
}

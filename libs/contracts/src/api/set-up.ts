import type { Characteristic, Instant, Named } from './common';

/**
 * A plant's own set-up. Every list is GET plants/:id/set-up/<things> (any role at the plant) with retired things last, every new thing is
 * POST to the same address, every change PATCH <things>/:id with only the fields that change. `isRetired: true` retires, `false` brings back.
 * Writing takes `set_up_plant`; specifications have permissions of their own. Refusals carry the field's JSON pointer.
 */

/** GET plants/:id/set-up; the answer of POST plants and PATCH plants/:id/set-up too. */
export interface PlantSetUpView extends Named {
  /** IANA name, such as Europe/London. */
  timeZone: string;
  /** False once the plant has readings. */
  mayChangeTimeZone: boolean;
  /** Three capital letters (ISO 4217), or null: no values are stated. */
  currency: string | null;
  /** Whether engineers may release lots held for control limits alone. */
  engineerMayRelease: boolean;
  /** Age of an open hold at which quality managers are reminded, h. */
  reminderManagerHours: number;
  /** Age at which directors are, h; not below the managers'. */
  reminderDirectorHours: number;
  /** Movement of a baseline that is told, as a share of the tolerance (0.1 is 10 %); used by plans proposed from now on. */
  allowanceNoticeShare: number;
  /** Movement beyond which lots are not scored, as a share of the tolerance; not below the notice. */
  allowanceCapShare: number;
}

/** POST plants: whoever makes a plant becomes its administrator. */
export interface NewPlantBody {
  name: string;
  timeZone: string;
  currency?: string | null;
}

/** PATCH plants/:id/set-up. */
export type PlantSetUpBody = Partial<Omit<PlantSetUpView, 'id' | 'mayChangeTimeZone'>>;

/** GET plants/:id/set-up/lines. */
export interface LineSetUpView extends Named {
  /** Channels in use on it; a line with any cannot be retired. */
  channelCount: number;
  isRetired: boolean;
}

/** POST plants/:id/set-up/lines. */
export interface NewLineBody {
  name: string;
}

/** PATCH lines/:id. */
export interface LineBody {
  name?: string;
  isRetired?: boolean;
}

/** One span of the plant's day, wall-clock times HH:MM; one that ends at or before its start runs over midnight. */
export interface ShiftSpan {
  name: string;
  startsAt: string;
  endsAt: string;
}

/** A calendar with its dates, YYYY-MM-DD; `until` is the first day of the next one, null: still in force. */
export interface ShiftCalendarView {
  validFrom: string;
  until: string | null;
  shifts: ShiftSpan[];
}

/** GET plants/:id/set-up/shifts: newest calendar first. */
export interface ShiftCalendarsView {
  calendars: ShiftCalendarView[];
}

/**
 * PUT plants/:id/set-up/shifts: a whole calendar from a date on; the one before ends there and keeps its meaning. A calendar that was to
 * begin on that date or later is replaced. Where lots were made in the calendar the date lies after today. Pointers: /validFrom, /shifts/1/endsAt …
 */
export interface ShiftCalendarBody {
  validFrom: string;
  shifts: ShiftSpan[];
}

/** GET plants/:id/set-up/products. */
export interface ProductSetUpView extends Named {
  code: string;
  /** What one unit of a lot's quantity is worth, in the plant's currency. */
  valuePerUnit: number | null;
  isRetired: boolean;
}

/** POST plants/:id/set-up/products. */
export interface NewProductBody {
  code: string;
  name: string;
  valuePerUnit?: number | null;
}

/** PATCH products/:id. */
export interface ProductBody extends Partial<NewProductBody> {
  isRetired?: boolean;
}

/** GET plants/:id/set-up/characteristics. */
export interface CharacteristicSetUpView extends Named, Characteristic {
  /** False once there are readings in it or a specification. */
  mayChangeUnit: boolean;
  isRetired: boolean;
}

/** POST plants/:id/set-up/characteristics. */
export interface NewCharacteristicBody {
  name: string;
  unit: string;
  /** Smallest step of an indication, in the unit. */
  resolution: number;
}

/** PATCH characteristics/:id. */
export interface CharacteristicBody extends Partial<NewCharacteristicBody> {
  isRetired?: boolean;
}

/** Nominal value and specification limits, in the characteristic's unit; one limit may be absent. */
export interface SpecificationLimits {
  nominal: number;
  lower: number | null;
  upper: number | null;
  /** Every reading is compared with the specification limits, not only the lot mean. */
  appliesToIndividuals: boolean;
}

export interface SpecificationVersionView extends SpecificationLimits {
  id: number;
  version: number;
  validFrom: Instant;
  /** Null: still in force. */
  until: Instant | null;
  proposedBy: string;
  approvedBy: string;
  approvedAt: Instant;
}

export interface SpecificationProposalView extends SpecificationLimits {
  id: number;
  validFrom: Instant;
  reason: string;
  proposedBy: string;
  proposedAt: Instant;
  mayApprove: boolean;
  /** Why this person may not approve it; a sentence. */
  whyNot: string | null;
  /** Its proposer, and quality managers. */
  mayWithdraw: boolean;
}

/** GET plants/:id/set-up/specifications: a product and characteristic with a version or a proposal each. */
export interface SpecificationSetUpView {
  product: { id: number; code: string; name: string };
  characteristic: Characteristic & { id: number };
  /** Newest first; empty while the first is only proposed. */
  versions: SpecificationVersionView[];
  /** The one that waits for approval, if any. */
  proposal: SpecificationProposalView | null;
}

/** POST plants/:id/set-up/specification-proposals (`propose_specification`): answers SpecificationSetUpView. */
export interface SpecificationProposalBody extends SpecificationLimits {
  productId: number;
  characteristicId: number;
  /** After the newest version's start. Lots that began since are judged again with it; what was decided stays decided. */
  validFrom: Instant;
  reason: string;
}

/**
 * POST specification-proposals/:id/approval (`approve_specification`): the next version, signed. POST specification-proposals/:id/withdrawal
 * takes no body. Both answer SpecificationSetUpView.
 */
export interface SpecificationApprovalBody {
  password: string;
}

/** GET plants/:id/set-up/gauges. */
export interface GaugeSetUpView {
  id: number;
  assetNumber: string;
  kind: string;
  /** Channels that it serves now; a gauge with any cannot be retired. */
  serves: { channelId: number; channelName: string; lineName: string; since: Instant }[];
  isRetired: boolean;
}

/** POST plants/:id/set-up/gauges. */
export interface NewGaugeBody {
  assetNumber: string;
  kind: string;
}

/** PATCH gauges/:id. */
export interface GaugeBody extends Partial<NewGaugeBody> {
  isRetired?: boolean;
}

/** A gauge's time on a channel; `until` null: it serves still. */
export interface GaugeServiceView {
  gaugeId: number;
  assetNumber: string;
  since: Instant;
  until: Instant | null;
}

/** GET plants/:id/set-up/channels. */
export interface ChannelSetUpView extends Named {
  line: Named;
  characteristic: Characteristic & { id: number };
  position: string;
  /** Newest first. */
  gauges: GaugeServiceView[];
  hasReadings: boolean;
  isRetired: boolean;
}

/** POST plants/:id/set-up/channels. */
export interface NewChannelBody {
  lineId: number;
  characteristicId: number;
  /** Where the gauge stands, such as "exit" or "A". */
  position: string;
  name: string;
  gaugeId: number;
  /** Since when the gauge serves here: not after the first readings that will be uploaded, not ahead of now. */
  since: Instant;
}

/** PATCH channels/:id. */
export interface ChannelBody {
  name?: string;
  position?: string;
  isRetired?: boolean;
}

/**
 * POST channels/:id/gauges: another gauge serves from an instant on, the one before ends there; answers ChannelSetUpView. With readings
 * on the channel a break of the kind gauge_change is declared at the same instant, and the lots around it are judged again.
 */
export interface ChannelGaugeBody {
  gaugeId: number;
  since: Instant;
}

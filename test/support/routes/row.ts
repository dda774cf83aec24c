import type { TestPerson } from '../factories/people';
import type { OneRole, Who } from './who';
import type { World } from './world';

type Values = Record<string, string | number>;

export interface Asked {
  /** For the {names} in the address. */
  at?: Values;
  query?: Values;
  body?: object;
  /** Sent as a form's field "file". */
  file?: { name: string; bytes: Buffer };
  cookie?: string;
}

export interface Done {
  asked: Asked;
  /** What the route answered. */
  answer: Record<string, unknown>;
  by: TestPerson;
}

/** The entry that a write leaves behind. */
export interface Entry {
  sentence: RegExp;
  kind: string;
  /** Of the thing; undefined when the answer does not name it: then any will do. */
  thing?: (world: World, done: Done) => number;
  /** The plant of the entry, where it is not the plant that all this is about. */
  plant?: (done: Done) => number;
  /** True where nobody is signed in: the entry is then of whom the request named. */
  isOfNobody?: boolean;
}

/** How a write is done once for real; or why it has no entry. */
export type Write =
  | { by: OneRole; prepare?: (world: World) => Promise<Asked> | Asked; entry: Entry; also?: Entry[] }
  | { exempt: string };

export interface Row {
  who: Who;
  /** What the route says of itself in openapi.json; "public": it needs no sign-in. */
  permission: string;
  /** What passes every check but that of who asks. */
  asked?: (world: World) => Asked;
  /** Of all that is no GET. */
  write?: Write;
  /** What it answers of a thing that is not there: 404 but where there is nothing left to do then. */
  ofNothing?: 204;
  /** It answers in a stream that goes on. */
  isStream?: boolean;
}

export type Rows = Record<string, Row>;

type Where = Pick<Row, 'asked'>;
const at = (id: (world: World) => number): Where => ({ asked: (world) => ({ at: { id: id(world) } }) });

export const ofPlant = at((world) => world.plant.id);
export const ofLine = at((world) => world.plant.lines[0].id);
export const ofChannel = at((world) => world.plant.channels[0].id);
export const ofLot = at((world) => world.shift.lots['24118'].id);
export const ofHold = at((world) => world.holdId);
export const ofIntake = at((world) => world.shift.intakeId);
export const ofProposal = at((world) => world.proposalId);
export const ofPlan = at((world) => world.proposedPlanId);

/** The place's address with a body. */
export const sending = (where: Where, body: object | ((world: World) => object)): Where => ({
  asked: (world) => ({
    ...where.asked?.(world),
    body: typeof body === 'function' ? (body as (world: World) => object)(world) : body,
  }),
});

export const reading = { who: 'read lines, lots, records, holds, gauges', permission: 'read' } as const;
export const settingUp = { who: 'people, set-up, mail failures', permission: 'set_up_plant' } as const;
export const ofOneself = { who: 'everybody, of their own', permission: 'read' } as const;
export const open = { who: 'anybody, signed in or not', permission: 'public' } as const;

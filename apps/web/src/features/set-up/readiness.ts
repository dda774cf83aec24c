import {
  ROLE_NAMES,
  type ChannelSetUpView,
  type CharacteristicSetUpView,
  type GaugeSetUpView,
  type LineSetUpView,
  type PlantSetUpView,
  type ProductSetUpView,
  type Role,
  type ShiftCalendarView,
  type SpecificationSetUpView,
} from '@app/contracts';
import { sortVersions } from './specification-words';
import { calendarOn } from './shift-words';

export type SectionKey =
  'plant' | 'lines' | 'products' | 'characteristics' | 'specifications' | 'gauges' | 'channels' | 'people';

/** One thing that a first workbook needs: whether it is there, said in a sentence, and where it is seen to. */
export interface Readiness {
  section: SectionKey;
  isThere: boolean;
  sentence: string;
}

export interface SetUpFacts {
  plant: PlantSetUpView;
  calendars: readonly ShiftCalendarView[];
  lines: readonly LineSetUpView[];
  products: readonly ProductSetUpView[];
  characteristics: readonly CharacteristicSetUpView[];
  specifications: readonly SpecificationSetUpView[];
  gauges: readonly GaugeSetUpView[];
  channels: readonly ChannelSetUpView[];
  /** The roles of each person who may sign in; null where the reader may not know them. */
  people: readonly { roles: readonly Role[] }[] | null;
  now: number;
  /** The plant's day now. */
  today: string;
}

/** What is there and what is missing before the plant's first workbook, in the order in which it is set up. */
export function readinessOf(facts: SetUpFacts): Readiness[] {
  const lines = inUse(facts.lines);
  const products = inUse(facts.products);
  const characteristics = inUse(facts.characteristics);
  const gauges = inUse(facts.gauges);
  return [
    there('plant', `Times of the plant are those of ${facts.plant.timeZone}.`),
    shiftsOf(facts),
    counted('lines', lines.map(nameOf), 'No line yet: a workbook is uploaded to a line.', 'line'),
    counted(
      'products',
      products.map(({ code }) => code),
      'No product yet: each lot is of one.',
      'product',
    ),
    counted(
      'characteristics',
      characteristics.map(nameOf),
      'No characteristic yet: what is measured, with its unit.',
      'characteristic',
    ),
    specificationsOf(products, facts),
    counted(
      'gauges',
      gauges.map(({ assetNumber }) => assetNumber),
      'No gauge yet.',
      'gauge',
    ),
    channelsOf(lines, facts),
    ...(facts.people === null ? [] : peopleOf(facts.people)),
  ];
}

/** The lead of the list: "3 things are missing before …"; a plant that has readings is past its first workbook. */
export function readinessWords(items: readonly Readiness[], plantName: string, isNew: boolean): string {
  const [one, ready] = isNew
    ? ['its first workbook', 'is ready for its first workbook']
    : ['any workbook', 'can take workbooks'];
  const missing = items.filter(({ isThere }) => !isThere).length;
  if (missing === 0) return `Nothing is missing: ${plantName} ${ready}.`;
  const things = missing === 1 ? 'One thing is' : `${missing} things are`;
  return `${things} missing before ${plantName} can take ${one}.`;
}

const there = (section: SectionKey, sentence: string): Readiness => ({ section, isThere: true, sentence });
const missing = (section: SectionKey, sentence: string): Readiness => ({ section, isThere: false, sentence });
const inUse = <T extends { isRetired: boolean }>(things: readonly T[]): T[] => things.filter((one) => !one.isRetired);
const nameOf = ({ name }: { name: string }): string => name;

const MOST_NAMES = 4;
/** "A, B and C", or the first few and how many more. */
export function listed(names: readonly string[]): string {
  const shown = names.length > MOST_NAMES ? names.slice(0, MOST_NAMES - 1) : names.slice(0, -1);
  const last = names.length > MOST_NAMES ? `${names.length - shown.length} more` : names.slice(-1)[0];
  return shown.length === 0 ? (last ?? '') : `${shown.join(', ')} and ${last}`;
}

function counted(section: SectionKey, names: readonly string[], none: string, one: string): Readiness {
  if (names.length === 0) return missing(section, none);
  return there(section, `${names.length} ${one}${names.length === 1 ? '' : 's'}: ${listed(names)}.`);
}

function shiftsOf({ calendars, today }: SetUpFacts): Readiness {
  const calendar = calendarOn(calendars, today);
  if (calendar !== undefined) return there('lines', `Shifts: ${listed(calendar.shifts.map(nameOf))}.`);
  const first = calendars.at(-1);
  if (first === undefined) return missing('lines', 'No shift calendar yet: readings are put into shifts by it.');
  return missing('lines', `The shift calendar begins only on ${first.validFrom}.`);
}

function specificationsOf(products: readonly ProductSetUpView[], facts: SetUpFacts): Readiness {
  const { specifications, channels, now } = facts;
  const approved = specifications.filter(({ versions }) => sortVersions(versions, now).inForce !== null);
  const bare = products.filter(({ id }) => !approved.some(({ product }) => product.id === id));
  const waiting = specifications.filter(({ proposal }) => proposal !== null).length;
  const waits = waiting === 0 ? '' : ` ${waiting} proposed, waiting for a quality manager.`;
  if (products.length === 0) return missing('specifications', 'No specification yet: it follows the products.');
  if (bare.length > 0)
    return missing('specifications', `No approved specification for ${listed(bare.map(({ code }) => code))}.${waits}`);
  const open = inUse(channels).filter(
    (channel) => !approved.some(({ characteristic }) => characteristic.id === channel.characteristic.id),
  );
  if (open.length > 0) {
    const names = [...new Set(open.map((channel) => channel.characteristic.name))];
    return missing('specifications', `No product has an approved specification in ${listed(names)}.${waits}`);
  }
  return there('specifications', `Each product has an approved specification.${waits}`);
}

function channelsOf(lines: readonly LineSetUpView[], facts: SetUpFacts): Readiness {
  const channels = inUse(facts.channels);
  if (channels.length === 0)
    return missing('channels', 'No channel yet: which gauge measures which characteristic on which line.');
  const isServed = ({ gauges }: ChannelSetUpView) =>
    gauges.some(
      ({ since, until }) => Date.parse(since) <= facts.now && (until === null || Date.parse(until) > facts.now),
    );
  const unserved = channels.filter((channel) => !isServed(channel));
  if (unserved.length > 0)
    return missing(
      'channels',
      `No gauge serves ${listed(unserved.map(({ name, line }) => `${name} on ${line.name}`))}.`,
    );
  const bare = lines.filter(({ id }) => !channels.some(({ line }) => line.id === id));
  if (bare.length > 0) return missing('channels', `No channel yet on ${listed(bare.map(nameOf))}.`);
  return there(
    'channels',
    `${channels.length} ${channels.length === 1 ? 'channel has its' : 'channels have their'} gauge.`,
  );
}

const NEEDED_ROLES = ['engineer', 'quality_manager', 'line_lead'] as const satisfies readonly Role[];

function peopleOf(people: readonly { roles: readonly Role[] }[]): Readiness[] {
  const absent = NEEDED_ROLES.filter((role) => !people.some(({ roles }) => roles.includes(role)));
  if (absent.length === 0) return [there('people', 'There is a quality engineer, a quality manager and a line lead.')];
  return [missing('people', `No ${absent.map((role) => ROLE_NAMES[role]).join(', no ')} yet.`)];
}

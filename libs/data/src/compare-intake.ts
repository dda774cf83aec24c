import { DomainError, type DifferingReading, type IntakeComparison } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';
import { DIFFERS, gatherIncoming, inForce, type IntakePlace, IS_NEW, lockLineReadings } from './incoming-readings';
import { findIntake, type IntakeRow } from './intakes';

const MOST_DIFFERING = 500;
const MOST_LOTS = 200;
const MOST_OVERLAPS = 50;

type Place = Pick<IntakeRow, 'id' | 'plantId' | 'lineId' | 'rowsRead'>;

/** What a comparison was made with: it holds as long as nothing on the line changed. */
interface Seen {
  /** Sum of the versions of the line's channels. */
  inputsVersion: number;
  /** Readings up to this one were there. */
  lastReadingId: number;
}

/**
 * Holds an intake's staged readings against what is stored, set by set, and keeps the outcome with the intake. Nothing is stored on the
 * line until the transaction ends.
 */
export async function compareIntake(tx: Transaction, intake: Place, at: Date): Promise<IntakeComparison> {
  await lockLineReadings(tx, intake.lineId);
  const seen = await getSeen(tx, intake.lineId);
  const place: IntakePlace = { intakeId: intake.id, plantId: intake.plantId, lineId: intake.lineId };
  await gatherIncoming(tx, place);
  const counts = await getCounts(tx);
  const comparison: IntakeComparison = {
    at: at.toISOString(),
    ...counts,
    rowsNotUsed: intake.rowsRead - counts.rowsNew - counts.rowsDiffering - counts.rowsAlreadyThere,
    differing: counts.readingsDiffering === 0 ? [] : await listDiffering(tx),
    readingsNotInFile: await getCountNotInFile(tx),
    overlaps: await listOverlaps(tx, intake.id),
    ...(await listTouchedLots(tx)),
  };
  await tx.raw('drop table incoming');
  await tx('intakes')
    .where({ id: intake.id })
    .update({ comparison: JSON.stringify({ ...comparison, seen }) });
  return comparison;
}

/**
 * Compares an intake that waits for its confirmation again when anything changed on its line since. To be committed, whatever it says.
 * @returns whether confirming would do something else than was shown
 */
export async function refreshComparison(tx: Transaction, intakeId: number, at: Date): Promise<boolean> {
  const intake = await findIntake(tx, intakeId);
  if (intake?.state !== 'needs_attention' || intake.report === null) return false;
  await lockLineReadings(tx, intake.lineId);
  if (await isComparisonFresh(tx, intake)) return false;
  const fresh = await compareIntake(tx, intake, at);
  return intake.comparison === null ? fresh.readingsDiffering > 0 : doingOf(fresh) !== doingOf(intake.comparison);
}

/** Refuses to confirm by a comparison that is out of date; the line's readings are locked from here on. */
export async function refuseOutdatedComparison(tx: Transaction, intake: IntakeRow): Promise<void> {
  await lockLineReadings(tx, intake.lineId);
  if (!(await isComparisonFresh(tx, intake))) throw comparisonChanged();
}

export const comparisonChanged = () =>
  new DomainError(
    'conflict',
    'comparison-changed',
    'Another intake of this line was stored or withdrawn meanwhile, so that this one would do something else than was shown. Look at what would change now, then confirm.',
  );

/** Readings up to this id may be superseded by a confirmed intake: those that were there when it was compared. */
export async function findSupersedable(tx: Transaction, intake: IntakeRow): Promise<number | null> {
  return intake.differing === 'supersede' ? ((await findSeen(tx, intake.id))?.lastReadingId ?? null) : null;
}

async function isComparisonFresh(db: Queryable, { id, lineId }: IntakeRow): Promise<boolean> {
  return (await findSeen(db, id))?.inputsVersion === (await getSeen(db, lineId)).inputsVersion;
}

async function findSeen(db: Queryable, intakeId: number): Promise<Seen | undefined> {
  const row = await findRow<{ seen: Seen | null }>(
    db,
    `select comparison->'seen' as seen from intakes where id = :intakeId`,
    { intakeId },
  );
  return row?.seen ?? undefined;
}

async function getSeen(db: Queryable, lineId: number): Promise<Seen> {
  const seen = await findRow<Seen>(
    db,
    `select (select coalesce(sum(inputs_version), 0)::bigint from channels where line_id = :lineId) as "inputsVersion",
       (select coalesce(max(id), 0) from readings) as "lastReadingId"`,
    { lineId },
  );
  return seen as Seen;
}

/** What confirming would do, without when it was looked at. */
const doingOf = ({ at: _at, ...doing }: IntakeComparison) => JSON.stringify(sorted(doing));

/** Objects come back from the database with their keys in another order. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (value === null || typeof value !== 'object') return value;
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([key, item]) => [key, sorted(item)]));
}

type Counts = Omit<
  IntakeComparison,
  'at' | 'rowsNotUsed' | 'differing' | 'readingsNotInFile' | 'overlaps' | 'lotsDecided' | 'lotsSettled'
>;

async function getCounts(tx: Transaction): Promise<Counts> {
  const [counts] = await rows<Counts>(
    tx,
    `select count(*) filter (where new > 0) as "rowsNew", count(*) filter (where new = 0 and differing > 0) as "rowsDiffering",
       count(*) filter (where new = 0 and differing = 0 and there > 0) as "rowsAlreadyThere", coalesce(sum(new), 0)::bigint as "readingsNew",
       coalesce(sum(there - differing), 0)::bigint as "readingsAlreadyThere", coalesce(sum(differing), 0)::bigint as "readingsDiffering"
     from (
       select count(*) filter (where ${IS_NEW}) as new, count(*) filter (where is_there) as there, count(*) filter (where ${DIFFERS}) as differing
       from incoming group by sheet, "row"
     ) by_row`,
  );
  return counts;
}

async function listDiffering(tx: Transaction): Promise<DifferingReading[]> {
  const found = await rows<Omit<DifferingReading, 'at'> & { at: Date }>(
    tx,
    `select i.sheet, i."row", i."column", i.lot, c.name as "channelName", x.unit, i.measured_at as at, i.stored_value as stored,
       i.stored_censoring as "storedCensoring", i.value as incoming, i.censoring as "incomingCensoring"
     from incoming i join channels c on c.id = i.channel_id join characteristics x on x.id = c.characteristic_id
     where ${DIFFERS} order by i.ordinal limit ${MOST_DIFFERING}`,
  );
  return found.map(({ at, ...reading }) => ({ ...reading, at: at.toISOString() }));
}

/** Readings in force of the same lots and channels, within the channel's span of time in the workbook, that it does not have. */
async function getCountNotInFile(tx: Transaction): Promise<number> {
  const row = await findRow<{ count: number }>(
    tx,
    `with pairs as (
       select channel_id, lot_id, count(*) filter (where is_there) as matched from incoming where lot_id is not null group by 1, 2
     ), spans as (
       select channel_id, min(measured_at) as from_at, max(measured_at) as to_at from incoming group by 1
     )
     select coalesce(sum(s.stored - p.matched), 0)::bigint as count
     from pairs p join spans n on n.channel_id = p.channel_id join lots l on l.id = p.lot_id cross join lateral (
       select count(*) as stored from readings r where r.channel_id = p.channel_id and r.lot_id = p.lot_id and ${inForce('r')}
         and r.measured_at between greatest(n.from_at, l.starts_at) and least(n.to_at, l.ends_at)
     ) s`,
  );
  return row?.count ?? 0;
}

async function listOverlaps(tx: Transaction, intakeId: number): Promise<IntakeComparison['overlaps']> {
  const found = await rows<{
    intakeId: number;
    fileName: string;
    receivedAt: Date;
    receivedBy: string;
    lots: string[];
  }>(
    tx,
    `select i.id as "intakeId", i.file_name as "fileName", i.received_at as "receivedAt", p.name as "receivedBy",
       (array_agg(distinct t.lot order by t.lot))[1:${MOST_LOTS}] as lots
     from (select distinct channel_id, lot_id, lot from incoming where lot_id is not null) t
     join intake_lots b on b.channel_id = t.channel_id and b.lot_id = t.lot_id and b.intake_id <> :intakeId
     join intakes i on i.id = b.intake_id and i.state <> 'withdrawn' join people p on p.id = i.received_by
     group by i.id, p.name order by i.received_at desc, i.id desc limit ${MOST_OVERLAPS}`,
    { intakeId },
  );
  return found.map(({ receivedAt, ...overlap }) => ({ ...overlap, receivedAt: receivedAt.toISOString() }));
}

/** Lots with a reading that is new or differs and that are decided, or settled on a channel that it is of. */
async function listTouchedLots(tx: Transaction): Promise<Pick<IntakeComparison, 'lotsDecided' | 'lotsSettled'>> {
  const touched = await rows<{ lot: string; isDecided: boolean; isSettled: boolean }>(
    tx,
    `select t.lot, exists (select 1 from holds h where h.lot_id = t.lot_id and h.state = 'decided') as "isDecided",
       bool_or(v.id is not null) as "isSettled"
     from (select distinct channel_id, lot_id, lot from incoming where lot_id is not null and ((${IS_NEW}) or (${DIFFERS}))) t
     left join verdicts v on v.channel_id = t.channel_id and v.lot_id = t.lot_id and v.is_current and not v.is_provisional
       and v.not_scored_reason is distinct from 'no_plan_in_force'
     group by t.lot, t.lot_id order by t.lot`,
  );
  const listed = (isListed: (lot: (typeof touched)[number]) => boolean) =>
    touched
      .filter(isListed)
      .slice(0, MOST_LOTS)
      .map(({ lot }) => lot);
  return { lotsDecided: listed((lot) => lot.isDecided), lotsSettled: listed((lot) => lot.isSettled) };
}

import { findRow, type Queryable, rows } from './database';

export interface AuditFilter {
  plantId: number;
  /** Whether entries of no plant (sign-ins, say) of the plant's people belong to the answer. */
  withPlantless: boolean;
  /** Null: what Ebbline did by itself. */
  actorId?: number | null;
  thingKind?: string;
  thingId?: number;
  action?: string;
  /** At or after, and before. */
  from?: Date;
  to?: Date;
  /** Part of the sentence. */
  text?: string;
}

export interface AuditRow {
  id: number;
  at: Date;
  actorId: number | null;
  actorName: string;
  action: string;
  thingKind: string;
  thingId: number;
  thingName: string | null;
  sentence: string;
  before: unknown;
  after: unknown;
  address: string | null;
}

/** A page by count, or what is older than an entry. */
export type AuditReach = { limit: number; offset: number } | { limit: number; olderThanId?: number };

const OF_PLANT = 'e.plant_id = :plantId';
/** Of somebody who is somebody at the plant, or about such a person. */
const OF_ITS_PEOPLE = `e.plant_id is null and (
  e.actor_id in (select m.person_id from memberships m where m.plant_id = :plantId)
  or (e.thing_kind = 'person' and e.thing_id in (select m.person_id from memberships m where m.plant_id = :plantId)))`;

/** What the thing is called now. Each look-up runs for the page's entries of its kind alone. */
const THING_NAME = `case e.thing_kind
  when 'hold' then (select 'lot ' || l.number from holds h join lots l on l.id = h.lot_id where h.id = e.thing_id)
  when 'lot' then (select 'lot ' || l.number from lots l where l.id = e.thing_id)
  when 'intake' then (select i.file_name from intakes i where i.id = e.thing_id)
  when 'plan' then (select c.name || ', revision ' || r.revision from plan_revisions r join channels c on c.id = r.channel_id where r.id = e.thing_id)
  when 'channel' then (select c.name from channels c where c.id = e.thing_id)
  when 'person' then (select p.name from people p where p.id = e.thing_id)
  when 'plant' then (select p.name from plants p where p.id = e.thing_id)
  when 'line' then (select n.name from lines n where n.id = e.thing_id)
  when 'product' then (select d.code from products d where d.id = e.thing_id)
  when 'characteristic' then (select c.name from characteristics c where c.id = e.thing_id)
  when 'gauge' then (select g.asset_number from gauges g where g.id = e.thing_id)
  when 'specification_proposal' then (select c.name || ' of ' || d.code from specification_proposals s
    join products d on d.id = s.product_id join characteristics c on c.id = s.characteristic_id where s.id = e.thing_id)
  when 'mail' then (select o.subject from outbox o where o.id = e.thing_id)
  when 'summary' then (select 'week of ' || to_char(s.week_starts_on, 'FMDD Mon YYYY') from summaries s where s.id = e.thing_id)
  end`;

function conditionsOf(filter: AuditFilter): { sql: string; bindings: Record<string, unknown> } {
  const conditions: string[] = [];
  const bindings: Record<string, unknown> = { plantId: filter.plantId };
  const add = (name: string, value: unknown, condition: string) => {
    if (value === undefined) return;
    conditions.push(condition);
    bindings[name] = value;
  };
  if (filter.actorId === null) conditions.push('e.actor_id is null');
  else add('actorId', filter.actorId, 'e.actor_id = :actorId');
  add('thingKind', filter.thingKind, 'e.thing_kind = :thingKind');
  add('thingId', filter.thingId, 'e.thing_id = :thingId');
  add('action', filter.action, 'e.action = :action');
  add('from', filter.from, 'e.at >= :from');
  add('to', filter.to, 'e.at < :to');
  const text = filter.text?.trim();
  if (text) add('text', `%${text.replaceAll(/[\\%_]/g, '\\$&')}%`, 'e.sentence ilike :text');
  return { sql: conditions.map((condition) => ` and ${condition}`).join(''), bindings };
}

const placesOf = (filter: AuditFilter) => (filter.withPlantless ? [OF_PLANT, OF_ITS_PEOPLE] : [OF_PLANT]);

export async function getAuditCount(db: Queryable, filter: AuditFilter): Promise<number> {
  const { sql, bindings } = conditionsOf(filter);
  const counts = placesOf(filter).map((place) => `(select count(*) from audit_entries e where ${place}${sql})`);
  return (await findRow<{ total: number }>(db, `select ${counts.join(' + ')} as total`, bindings))?.total ?? 0;
}

/** Entries, newest first. */
export function listAuditEntries(db: Queryable, filter: AuditFilter, reach: AuditReach): Promise<AuditRow[]> {
  const { sql, bindings } = conditionsOf(filter);
  const offset = 'offset' in reach ? reach.offset : 0;
  const olderThanId = 'olderThanId' in reach ? reach.olderThanId : undefined;
  const older =
    olderThanId === undefined
      ? ''
      : ' and (e.at, e.id) < (select o.at, o.id from audit_entries o where o.id = :olderThanId)';
  // Each place is read as far as the page reaches, by its own index; only then are they merged.
  const branches = placesOf(filter).map(
    (place) =>
      `(select e.id, e.at from audit_entries e where ${place}${sql}${older} order by e.at desc, e.id desc limit :reach)`,
  );
  return rows<AuditRow>(
    db,
    `with page as (
       select id from (${branches.join(' union all ')}) found order by at desc, id desc limit :limit offset :offset
     )
     select e.id, e.at, e.actor_id as "actorId", e.actor_name as "actorName", e.action, e.thing_kind as "thingKind",
       e.thing_id as "thingId", ${THING_NAME} as "thingName", e.sentence, e.before, e.after, e.address
     from page g join audit_entries e on e.id = g.id order by e.at desc, e.id desc`,
    {
      ...bindings,
      ...(olderThanId === undefined ? {} : { olderThanId }),
      limit: reach.limit,
      offset,
      reach: reach.limit + offset,
    },
  );
}

/** Everybody who has an entry at the plant, by name; with plantless entries also the plant's own people. */
export function listAuditPeople(
  db: Queryable,
  { plantId, withPlantless }: Pick<AuditFilter, 'plantId' | 'withPlantless'>,
): Promise<{ id: number; name: string }[]> {
  const alsoMembers = withPlantless
    ? 'or p.id in (select m.person_id from memberships m where m.plant_id = :plantId)'
    : '';
  return rows(
    db,
    `select p.id, p.name from people p
     where exists (select 1 from audit_entries e where e.plant_id = :plantId and e.actor_id = p.id) ${alsoMembers}
     order by p.name, p.id`,
    { plantId },
  );
}

/** What was done to which kinds of thing. */
export function listAuditKinds(
  db: Queryable,
  filter: Pick<AuditFilter, 'plantId' | 'withPlantless'>,
): Promise<{ kind: string; actions: string[] }[]> {
  const places = placesOf(filter).map(
    (place) => `select e.thing_kind as kind, e.action from audit_entries e where ${place} group by 1, 2`,
  );
  return rows(
    db,
    `select kind, array_agg(distinct action order by action) as actions from (${places.join(' union all ')}) found
     group by kind order by kind`,
    { plantId: filter.plantId },
  );
}

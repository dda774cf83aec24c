import { rows, type Queryable } from './database';

/** The plant's shift at each instant, by its calendar on that day; null where the calendar has none. In the order of the instants. */
export async function listShiftNames(
  db: Queryable,
  plantId: number,
  instants: readonly Date[],
): Promise<(string | null)[]> {
  const found = await rows<{ name: string | null }>(
    db,
    `select s.name from unnest(cast(:instants as timestamptz[])) with ordinality as i (at, ordinal)
     join plants p on p.id = :plantId
     left join shifts s on s.plant_id = p.id and s.valid @> (i.at at time zone p.time_zone)::date
       and s.minutes @> (date_part('hour', i.at at time zone p.time_zone) * 60 + date_part('minute', i.at at time zone p.time_zone))::integer
     order by i.ordinal`,
    { plantId, instants: instants.map((at) => at.toISOString()) },
  );
  return found.map(({ name }) => name);
}

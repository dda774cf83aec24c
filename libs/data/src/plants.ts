import { findRow, type Queryable, rows } from './database';

export interface PlantRow {
  id: number;
  name: string;
  timeZone: string;
}

export interface LineRow {
  id: number;
  name: string;
  plantId: number;
  /** Lots of the line that are held and undecided. */
  heldCount: number;
}

export interface LinePlace {
  id: number;
  name: string;
  isRetired: boolean;
  plantId: number;
  plantName: string;
  timeZone: string;
}

/** The plants where the person is somebody. */
export function listPlants(db: Queryable, personId: number): Promise<PlantRow[]> {
  return rows<PlantRow>(
    db,
    `select id, name, time_zone as "timeZone" from plants
     where id in (select plant_id from memberships where person_id = :personId) order by name`,
    { personId },
  );
}

export function findPlant(db: Queryable, id: number): Promise<(PlantRow & { plantId: number }) | undefined> {
  return findRow(db, `select id, id as "plantId", name, time_zone as "timeZone" from plants where id = :id`, { id });
}

/** The lines in use. */
export function listLines(db: Queryable, plantId: number): Promise<LineRow[]> {
  return rows<LineRow>(
    db,
    `select l.id, l.name, l.plant_id as "plantId", coalesce(h.count, 0)::int as "heldCount"
     from lines l left join (select line_id, count(*) from holds where plant_id = :plantId and state = 'open' group by line_id) h
       on h.line_id = l.id
     where l.plant_id = :plantId and l.retired_at is null order by l.name`,
    { plantId },
  );
}

export function findLine(db: Queryable, id: number): Promise<LinePlace | undefined> {
  return findRow<LinePlace>(
    db,
    `select l.id, l.name, l.retired_at is not null as "isRetired", l.plant_id as "plantId", p.name as "plantName", p.time_zone as "timeZone"
     from lines l join plants p on p.id = l.plant_id where l.id = :id`,
    { id },
  );
}

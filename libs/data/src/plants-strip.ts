import { type Queryable, rows } from './database';

/** A lot with the shift in which it started. */
export interface StripLotRow {
  id: number;
  number: string;
  startsAt: Date;
  endsAt: Date;
  shiftName: string;
  shiftStartsAt: Date;
  shiftEndsAt: Date;
}

/** No line makes as many lots in this many shifts; it bounds what is read. */
const MOST_LOTS = 1_000;

/**
 * Lots of the line's last shifts that have any, oldest first. A shift that runs over midnight belongs to the day on which it begins;
 * instants come of the plant's wall clock, so that a shift with a change of clocks in it is an hour shorter or longer. Lots at
 * a time that the calendar does not cover stand together by day.
 */
export function listStripLots(db: Queryable, lineId: number, shiftCount: number): Promise<StripLotRow[]> {
  return rows<StripLotRow>(
    db,
    `with recent as (
       select l.id, l.plant_id, l.number, l.starts_at, l.ends_at, p.time_zone, l.starts_at at time zone p.time_zone as wall
       from lots l join plants p on p.id = l.plant_id where l.line_id = :lineId and l.withdrawn_at is null
       order by l.starts_at desc, l.id desc limit :mostLots
     ), placed as (
       select r.*, coalesce(s.name, 'outside the shift calendar') as shift_name,
         case when s.ends_at <= s.starts_at and r.wall::time < s.ends_at then r.wall::date - 1 else r.wall::date end as day,
         coalesce(s.starts_at, '00:00') as shift_from, coalesce(s.ends_at, '00:00') as shift_to
       from recent r left join shifts s on s.plant_id = r.plant_id and s.valid @> r.wall::date
         and s.minutes @> (extract(hour from r.wall) * 60 + extract(minute from r.wall))::int
     ), shifted as (
       select id, number, starts_at, ends_at, shift_name, (day + shift_from) at time zone time_zone as shift_starts_at,
         (day + shift_to + case when shift_to <= shift_from then interval '1 day' else interval '0' end) at time zone time_zone as shift_ends_at
       from placed
     ), ranked as (
       select *, dense_rank() over (order by shift_starts_at desc, shift_ends_at desc) as place from shifted
     )
     select id, number, starts_at as "startsAt", ends_at as "endsAt", shift_name as "shiftName",
       shift_starts_at as "shiftStartsAt", shift_ends_at as "shiftEndsAt"
     from ranked where place <= :shiftCount order by shift_starts_at, shift_ends_at, starts_at, id`,
    { lineId, shiftCount, mostLots: MOST_LOTS },
  );
}

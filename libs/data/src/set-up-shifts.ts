import { findRow, type Queryable, rows, type Transaction } from './database';

export interface ShiftRow {
  name: string;
  /** Wall-clock time, HH:MM. */
  startsAt: string;
  endsAt: string;
  /** First day, YYYY-MM-DD. */
  validFrom: string;
  /** First day on which it is no longer so; null: open. */
  until: string | null;
}

/** All shifts that ever were or will be, newest calendar first, in order of the day. */
export function listShifts(db: Queryable, plantId: number): Promise<ShiftRow[]> {
  return rows<ShiftRow>(
    db,
    `select name, to_char(starts_at, 'HH24:MI') as "startsAt", to_char(ends_at, 'HH24:MI') as "endsAt",
       to_char(lower(valid), 'YYYY-MM-DD') as "validFrom", to_char(upper(valid), 'YYYY-MM-DD') as until
     from shifts where plant_id = :plantId order by lower(valid) desc, starts_at, id`,
    { plantId },
  );
}

/** Whether a lot started on a day from `from` (YYYY-MM-DD, plant's zone) on that the present calendar covers. */
export async function hasLotsInCalendar(db: Queryable, plantId: number, from: string): Promise<boolean> {
  const found = await findRow(
    db,
    `select 1 from lots l join plants p on p.id = l.plant_id join shifts s on s.plant_id = p.id
       and s.valid @> (l.starts_at at time zone p.time_zone)::date
     where l.plant_id = :plantId and l.starts_at >= cast(:from as date)::timestamp at time zone p.time_zone limit 1`,
    { plantId, from },
  );
  return found !== undefined;
}

/** Puts a calendar in the place of all that would hold from its first day on. Spans given as minutes of the day (an int4multirange). */
export async function replaceShifts(
  tx: Transaction,
  plantId: number,
  calendar: { validFrom: string; shifts: { name: string; startsAt: string; endsAt: string; minutes: string }[] },
): Promise<void> {
  const from = { plantId, validFrom: calendar.validFrom };
  await tx.raw('delete from shifts where plant_id = :plantId and lower(valid) >= cast(:validFrom as date)', from);
  await tx.raw(
    `update shifts set valid = daterange(lower(valid), cast(:validFrom as date))
     where plant_id = :plantId and valid @> cast(:validFrom as date)`,
    from,
  );
  for (const shift of calendar.shifts)
    await tx.raw(
      `insert into shifts (plant_id, name, starts_at, ends_at, minutes, valid)
       values (:plantId, :name, :startsAt, :endsAt, cast(:minutes as int4multirange), daterange(cast(:validFrom as date), null))`,
      { ...from, ...shift },
    );
}

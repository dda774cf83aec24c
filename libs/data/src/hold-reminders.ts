import type { ReminderAudience } from '@app/contracts';
import { type Queryable, rows, type Transaction } from './database';

/** At what age of an open hold each audience is told of it, as the plant has set it. */
const HOURS: Record<ReminderAudience, string> = {
  quality_manager: 'p.reminder_manager_hours',
  director: 'p.reminder_director_hours',
};

/** An open hold is due once it is as old as told, in elapsed hours, and the audience was not told of it yet. */
const due = (audience: ReminderAudience) => `h.state = 'open'
  and h.opened_at <= cast(:now as timestamptz) - make_interval(secs => ${HOURS[audience]} * 3600)
  and not exists (select 1 from hold_reminders r where r.hold_id = h.id and r.audience = :audience)`;

/** The reminders of a hold `h` as JSON, for a query's column. */
export const REMINDERS_OF_HOLD = `coalesce((select json_agg(json_build_object('audience', m.audience, 'at', m.reminded_at)
  order by m.reminded_at, m.audience) from hold_reminders m where m.hold_id = h.id), '[]')`;

export interface ReminderPlant {
  plantId: number;
  plantName: string;
  timeZone: string;
  currency: string | null;
  hours: number;
}

/** The plants with open holds of which the audience is still to be told. */
export function listPlantsToRemind(db: Queryable, audience: ReminderAudience, now: Date): Promise<ReminderPlant[]> {
  return rows<ReminderPlant>(
    db,
    `select p.id as "plantId", p.name as "plantName", p.time_zone as "timeZone", p.currency, ${HOURS[audience]} as hours
     from plants p where exists (select 1 from holds h where h.plant_id = p.id and ${due(audience)}) order by p.id`,
    { audience, now },
  );
}

/**
 * Records that the audience is told of the plant's old open holds, and returns those of which it was not told before: a second worker
 * waits for the first one's transaction and then finds nothing left.
 */
export async function insertHoldReminders(
  tx: Transaction,
  plantId: number,
  audience: ReminderAudience,
  now: Date,
): Promise<number[]> {
  const inserted = await rows<{ holdId: number }>(
    tx,
    `insert into hold_reminders (plant_id, hold_id, audience, reminded_at)
     select h.plant_id, h.id, :audience, :now from holds h join plants p on p.id = h.plant_id
     where h.plant_id = :plantId and ${due(audience)} order by h.id
     on conflict (hold_id, audience) do nothing returning hold_id as "holdId"`,
    { plantId, audience, now },
  );
  return inserted.map(({ holdId }) => holdId);
}

export interface ReminderFact {
  holdId: number;
  lotNumber: string;
  lineName: string;
  product: string;
  openedAt: Date;
  quantity: number | null;
  quantityUnit: string | null;
  /** What the quantity is worth in the plant's currency, where both are known. */
  value: number | null;
  sentences: string[];
  isSetAside: boolean;
  /** Quality managers who may decide it: not those who confirmed an intake that led to it. */
  deciders: string[];
  /** When the quality managers were told, if they were. */
  managersRemindedAt: Date | null;
}

/** What a reminder says of each hold, oldest first. */
export function listReminderFacts(db: Queryable, holdIds: number[]): Promise<ReminderFact[]> {
  return rows<ReminderFact>(
    db,
    `select h.id as "holdId", l.number as "lotNumber", n.name as "lineName", p.code as product, h.opened_at as "openedAt",
       l.quantity, l.quantity_unit as "quantityUnit", l.quantity * p.value_per_unit as value, s.hold_id is not null as "isSetAside",
       coalesce((select json_agg(k.sentence order by k.id) from hold_causes k where k.hold_id = h.id), '[]') as sentences,
       coalesce((select json_agg(w.name order by w.name) from people w join memberships m on m.person_id = w.id
         where m.plant_id = h.plant_id and m.role = 'quality_manager' and w.disabled_at is null and not exists (
           select 1 from hold_causes k join intakes i on i.id = k.intake_id where k.hold_id = h.id and i.confirmed_by = w.id)), '[]')
         as deciders,
       r.reminded_at as "managersRemindedAt"
     from holds h join lots l on l.id = h.lot_id join lines n on n.id = h.line_id join products p on p.id = l.product_id
     left join set_asides s on s.hold_id = h.id
     left join hold_reminders r on r.hold_id = h.id and r.audience = 'quality_manager'
     where h.id = any(:holdIds) order by h.opened_at, h.id`,
    { holdIds },
  );
}

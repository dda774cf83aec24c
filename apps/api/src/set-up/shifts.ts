import {
  DomainError,
  type ShiftCalendarBody,
  type ShiftCalendarsView,
  type ShiftCalendarView,
  type ShiftSpan,
} from '@app/contracts';
import {
  findPlantSetUpForUpdate,
  hasLotsInCalendar,
  insertAuditEntry,
  listShifts,
  type PlantSetUpRow,
  replaceShifts,
  type ShiftRow,
  type Transaction,
} from '@app/data';
import { DateTime } from 'luxon';
import { type Change, refusal } from './change';
import { minutesOf, shiftErrors } from './shift-spans';

/** Shifts in order as calendars, newest first. */
export function calendarsView(rows: ShiftRow[]): ShiftCalendarsView {
  const calendars: ShiftCalendarView[] = [];
  for (const { validFrom, until, ...shift } of rows) {
    let calendar = calendars.at(-1);
    if (calendar?.validFrom !== validFrom) calendars.push((calendar = { validFrom, until, shifts: [] }));
    calendar.shifts.push(shift);
  }
  return { calendars };
}

/** Puts a calendar in force from a day on. Shifts that lots were made in keep their meaning. */
export async function changeShifts(tx: Transaction, change: Change, body: ShiftCalendarBody): Promise<void> {
  const { plantId, person, at } = change;
  const errors = shiftErrors(body.shifts);
  if (errors.length > 0) throw new DomainError('invalid', errors[0].code, 'The shifts do not fit together.', errors);
  const plant = (await findPlantSetUpForUpdate(tx, plantId)) as PlantSetUpRow;
  const today = DateTime.fromJSDate(at, { zone: plant.timeZone });
  if (body.validFrom <= today.toISODate()! && (await hasLotsInCalendar(tx, plantId, body.validFrom)))
    throw refusal(
      'shifts-in-use',
      '/validFrom',
      `Lots were made in the shifts of that day or later ones. A new calendar begins on ${today.plus({ days: 1 }).toISODate()} at the earliest.`,
    );
  const before = calendarsView(await listShifts(tx, plantId)).calendars;
  const same = before.at(0);
  if (same?.validFrom === body.validFrom && textOf(same.shifts) === textOf(body.shifts)) return;
  const { validFrom } = body;
  await replaceShifts(tx, plantId, {
    validFrom,
    shifts: body.shifts.map((shift) => ({ ...shift, minutes: minutesOf(shift) })),
  });
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'change-shifts',
    thingKind: 'plant',
    thingId: plantId,
    sentence: `${person.name} set the shifts of ${plant.name} from ${validFrom} on: ${textOf(body.shifts)}.`,
    before: { calendars: before },
    after: { validFrom, shifts: body.shifts },
  });
}

function textOf(shifts: ShiftSpan[]): string {
  const inOrder = [...shifts].sort((a, b) => (a.startsAt < b.startsAt ? -1 : 1));
  return inOrder.map(({ name, startsAt, endsAt }) => `${name} ${startsAt} to ${endsAt}`).join(', ');
}

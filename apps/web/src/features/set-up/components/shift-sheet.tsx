import type { ShiftCalendarView } from '@app/contracts';
import { useRef, useState } from 'react';
import { useSession } from '../../../shared/session/session';
import { plantDay } from '../../../shared/time/plant-time';
import { useNow } from '../../../shared/time/use-now';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { usePlantSetUp, useShifts } from '../api/set-up';
import { calendarOn, coverageWords, lengthOf, lengthWords, THREE_SHIFTS } from '../shift-words';
import { dayPlus } from '../typed-values';
import { ShiftForm } from './shift-form';

type Row = ShiftCalendarView['shifts'][number];

const COLUMNS: FoldingColumn<Row>[] = [
  { name: 'Shift', isLead: true, cell: ({ name }) => name },
  { name: 'From', isNumber: true, cell: ({ startsAt }) => startsAt },
  { name: 'Until', isNumber: true, cell: ({ endsAt }) => endsAt },
  { name: 'Length', isNumber: true, cell: (shift) => lengthWords(lengthOf(shift)) },
];

/** The shift calendar: the one in force, those before and after it, and the form of the next. */
export function ShiftSheet({ plantId }: { plantId: number }) {
  const query = useShifts(plantId);
  return (
    <Sheet
      title="Shift calendar"
      isFlush
      margin={
        <p>
          Times are the plant’s own wall clock. A shift that ends at or before its start runs over midnight; when clocks
          change, the night shift is an hour longer or shorter.
        </p>
      }
    >
      <Loaded query={query} failure="The shift calendar could not be loaded.">
        {({ calendars }) => <Calendars plantId={plantId} calendars={calendars} />}
      </Loaded>
    </Sheet>
  );
}

function Calendars({ plantId, calendars }: { plantId: number; calendars: ShiftCalendarView[] }) {
  const { plant, can } = useSession();
  const today = plantDay(useNow(), plant.timeZone);
  const isNew = usePlantSetUp(plantId).data?.mayChangeTimeZone ?? false;
  const [isOpen, setIsOpen] = useState(false);
  const opener = useRef<HTMLDivElement>(null);
  const inForce = calendarOn(calendars, today);
  const close = () => {
    setIsOpen(false);
    requestAnimationFrame(() => opener.current?.querySelector('button')?.focus());
  };
  const newest = calendars.at(0);
  return (
    <div className="rows">
      {calendars.length === 0 && (
        <div className="rows__empty">
          <EmptyNote>
            No shift calendar yet. Readings are put into shifts by it, over midnight too; an administrator states it
            here.
          </EmptyNote>
        </div>
      )}
      {calendars.map((calendar) => (
        <section key={calendar.validFrom} className="shift-calendar" aria-label={periodWords(calendar)}>
          <p className={calendar === inForce ? undefined : 'soft'}>
            {periodWords(calendar)}
            {calendar === inForce ? ', in force. ' : '. '}
            {coverageWords(calendar.shifts)}
          </p>
          {(calendar === inForce || calendar.validFrom > today) && (
            <FoldingTable
              caption={`Shifts ${periodWords(calendar).toLowerCase()}`}
              columns={COLUMNS}
              items={calendar.shifts}
              keyOf={({ name, startsAt }) => `${name} ${startsAt}`}
            />
          )}
        </section>
      ))}
      {can('set_up_plant') && (
        <div className="rows__add" ref={opener}>
          {isOpen ? (
            <ShiftForm
              plantId={plantId}
              shifts={newest?.shifts ?? THREE_SHIFTS}
              validFrom={isNew ? (newest?.validFrom ?? `${today.slice(0, 4)}-01-01`) : dayPlus(today, 1)}
              hint={isNew ? 'The first day of the oldest workbook, or before.' : 'After today: past shifts stay.'}
              onDone={close}
            />
          ) : (
            <Action kind="quiet" onPress={() => setIsOpen(true)}>
              {calendars.length === 0 ? 'State the shifts' : 'Change the shifts'}
            </Action>
          )}
        </div>
      )}
    </div>
  );
}

const periodWords = ({ validFrom, until }: ShiftCalendarView): string =>
  until === null ? `From ${validFrom} on` : `From ${validFrom} until ${dayPlus(until, -1)}`;

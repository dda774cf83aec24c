import type { StripLot, StripView } from '@app/contracts';
import { useRef, useState, type CSSProperties, type KeyboardEvent } from 'react';
import { Link, useMatch } from 'react-router-dom';
import { useSession } from '../../shared/session/session';
import { formatInstant } from '../../shared/time/plant-time';
import { Mark } from '../../shared/ui/mark';
import { markWords } from '../../shared/ui/mark-words';
import { routes, urls } from '../urls';
import { steppedIndex } from './tape-keys';

/** Lots in time order, parted by hairlines where shifts change. Arrow keys walk along it, Enter opens. */
export function Tape({ shifts }: { shifts: StripView['shifts'] }) {
  const tape = useRef<HTMLDivElement>(null);
  const lots = shifts.flatMap((shift) => shift.lots);
  const openLotId = Number(useMatch(routes.lot)?.params.lotId);
  const [walkedTo, setWalkedTo] = useState<number | null>(null);
  const entryId = [walkedTo, openLotId].find((id) => lots.some((lot) => lot.id === id)) ?? lots.at(-1)?.id;

  const onKeyDown = (event: KeyboardEvent) => {
    const links = [...(tape.current?.querySelectorAll<HTMLAnchorElement>('a') ?? [])];
    const index = links.indexOf(document.activeElement as HTMLAnchorElement);
    const next = steppedIndex(event.key, index, links.length);
    if (next === null) return;
    event.preventDefault();
    links[next].focus();
  };

  return (
    <div className="tape" ref={tape} onKeyDown={onKeyDown} role="group" aria-label="Arrow keys walk from lot to lot">
      {shifts.map((shift, index) => (
        <div
          key={shift.startsAt}
          className="tape__shift"
          style={{ '--lots': Math.max(1, shift.lots.length) } as CSSProperties}
          role="group"
          aria-label={shift.name}
        >
          <div className="tape__lots">
            {shift.lots.map((lot) => (
              <TapeLot
                key={lot.id}
                lot={lot}
                isOpen={lot.id === openLotId}
                isEntry={lot.id === entryId}
                isRight={index >= shifts.length / 2}
                onFocus={() => setWalkedTo(lot.id)}
              />
            ))}
          </div>
          <ShiftLabel shift={shift} before={shifts[index - 1]} after={shifts[index + 1]} />
        </div>
      ))}
    </div>
  );
}

interface TapeLotProps {
  lot: StripLot;
  isOpen: boolean;
  isEntry: boolean;
  isRight: boolean;
  onFocus: () => void;
}

function TapeLot({ lot, isOpen, isEntry, isRight, onFocus }: TapeLotProps) {
  const { plant } = useSession();
  const span = `${formatInstant(lot.startsAt, plant.timeZone, 'short')}–${formatInstant(lot.endsAt, plant.timeZone, 'time')}`;
  const words = markWords(lot.mark);
  const state = `${lot.mark.holdState === 'open' ? ' tape__lot--held' : ''}${isOpen ? ' tape__lot--open' : ''}`;
  return (
    <Link
      className={`tape__lot${state}`}
      to={urls.lot(lot.id)}
      tabIndex={isEntry ? 0 : -1}
      aria-label={`Lot ${lot.number}, ${span}, ${words}`}
      aria-current={isOpen ? 'page' : undefined}
      onFocus={onFocus}
    >
      <Mark mark={lot.mark} size={18} isSilent />
      <span className={`tape__name${isRight ? ' tape__name--right' : ''}`} aria-hidden="true">
        <strong>Lot {lot.number}</strong> {span}
        <br />
        {words}
      </span>
    </Link>
  );
}

type Shift = StripView['shifts'][number];

/** The shift's name, and the day where it changes; the month too, at the tape's beginning and on a month's first day. */
function ShiftLabel({ shift, before, after }: { shift: Shift; before?: Shift; after?: Shift }) {
  const { plant } = useSession();
  const dayOf = (other: Shift) => formatInstant(other.startsAt, plant.timeZone, 'day');
  const day = dayOf(shift);
  const isNewDay = before === undefined || dayOf(before) !== day;
  const isAlone = after !== undefined && dayOf(after) !== day;
  const tellsMonth = before === undefined || / 1 /.test(day);
  const dayWords = tellsMonth ? day : formatInstant(shift.startsAt, plant.timeZone, 'weekday');
  return (
    <div
      className={[
        'tape__label',
        isNewDay && 'tape__label--day',
        tellsMonth && isNewDay && 'tape__label--month',
        isAlone && 'tape__label--alone',
      ]
        .filter(Boolean)
        .join(' ')}
      aria-hidden="true"
    >
      {isNewDay && <strong>{dayWords} </strong>}
      <span>{shift.name}</span>
    </div>
  );
}

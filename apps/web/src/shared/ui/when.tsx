import type { Instant } from '@app/contracts';
import { useSession } from '../session/session';
import { formatInstant, type TimeForm } from '../time/plant-time';

/** An instant in the plant's zone, 24 h; the whole of it and the zone on hover. */
export function When({ at, form = 'full' }: { at: Instant | number; form?: TimeForm }) {
  const { plant } = useSession();
  return (
    <time
      className="when"
      dateTime={new Date(at).toISOString()}
      title={`${formatInstant(at, plant.timeZone, 'full')} (${plant.timeZone})`}
    >
      {formatInstant(at, plant.timeZone, form)}
    </time>
  );
}

import { formatSpan, type Instant } from '@app/contracts';
import { useNow } from '../time/use-now';

/** How long ago: "3 h 12 min". Keeps itself up to date. */
export function Age({ since }: { since: Instant | number }) {
  const now = useNow();
  return <span className="age">{formatSpan(Math.max(0, now - new Date(since).getTime()))}</span>;
}

import type { RecordView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { withQuery } from '../../app/urls';
import { apiGet } from '../api/client';
import type { TimeRange } from '../chart/range';
import { channelKeys } from './channel-keys';

const iso = (at: number) => new Date(Math.round(at)).toISOString();

/** The record over a range, or over the server's own choice of the newest readings; at most `width` columns of readings. */
export function useChannelRecord(channelId: number, range: TimeRange | null, width: number, isEnabled = true) {
  const query = { from: range && iso(range.from), to: range && iso(range.to), width };
  return useQuery({
    queryKey: [...channelKeys.records(channelId), query],
    queryFn: ({ signal }) => apiGet<RecordView>(withQuery(`/channels/${channelId}/record`, query), signal),
    // The last picture stays while a new range is on its way, but never another channel's.
    placeholderData: (previous, previousQuery) => (previousQuery?.queryKey[1] === channelId ? previous : undefined),
    enabled: isEnabled,
  });
}

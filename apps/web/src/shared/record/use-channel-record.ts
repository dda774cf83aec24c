import type { RecordView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { withQuery } from '../../app/urls';
import { apiGet } from '../api/client';
import type { TimeRange } from '../chart/range';
import { channelKeys } from './channel-keys';

/** Epoch milliseconds, as the record takes and answers them. */
const epoch = (at: number) => Math.max(Math.round(at), 0);

/** Of very many lots the server answers a part, and their full count. */
export interface ChannelRecord extends RecordView {
  lotCount?: number;
}

/** The record over a range, or over the server's own choice of the newest readings; at most `width` columns of readings. */
export function useChannelRecord(channelId: number, range: TimeRange | null, width: number, isEnabled = true) {
  const query = { from: range && epoch(range.from), to: range && epoch(range.to), width };
  return useQuery({
    queryKey: [...channelKeys.records(channelId), query],
    queryFn: ({ signal }) => apiGet<ChannelRecord>(withQuery(`/channels/${channelId}/record`, query), signal),
    // The last picture stays while a new range is on its way, but never another channel's.
    placeholderData: (previous, previousQuery) => (previousQuery?.queryKey[1] === channelId ? previous : undefined),
    enabled: isEnabled,
  });
}

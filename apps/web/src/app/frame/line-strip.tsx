import { useQuery } from '@tanstack/react-query';
import type { StripView } from '@app/contracts';
import { apiGet } from '../../shared/api/client';
import { useLine } from '../../shared/line-context/line-context';
import { asProblem } from '../../shared/api/problem';
import { Tape } from './tape';

const REFRESH_MS = 30_000;

export const stripKey = (lineId: number) => ['lines', lineId, 'strip'] as const;

/** The chosen line's tape of lots, on every page. Its height is the same in every state, so that the page below stays put. */
export function LineStrip() {
  const { lineId, line, isLoading, error } = useLine();
  const query = useQuery({
    queryKey: stripKey(lineId ?? 0),
    queryFn: ({ signal }) => apiGet<StripView>(`/lines/${lineId}/strip`, signal),
    enabled: lineId !== null,
    refetchInterval: REFRESH_MS,
  });
  const name = line?.name ?? 'the line';
  return (
    <section className="strip" aria-label={`Lots of ${name}, its last shifts`}>
      {stripContent()}
    </section>
  );

  function stripContent() {
    const shifts = query.data?.shifts;
    if (shifts !== undefined && shifts.length > 0) return <Tape shifts={shifts} />;
    if (error !== null) return <p className="strip__note">The lines could not be loaded. {asProblem(error).detail}</p>;
    if (query.isError)
      return (
        <p className="strip__note">
          The lots of {name} could not be loaded. {asProblem(query.error).detail}
        </p>
      );
    if (shifts !== undefined) {
      return (
        <p className="strip__note">No lots yet. The last fourteen shifts of {name} stand here once a workbook is in.</p>
      );
    }
    if (!isLoading && lineId === null) return <p className="strip__note">This plant has no line yet.</p>;
    return <div className="tape tape--loading" />;
  }
}

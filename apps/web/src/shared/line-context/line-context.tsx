import type { LineView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { createContext, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { useLocation, useSearchParams } from 'react-router-dom';
import { apiList } from '../api/client';
import { useSession } from '../session/session';
import { readStored, writeStored } from '../storage';
import { chooseLine, lineIdInAddress } from './choose-line';

interface LineContextValue {
  /** The chosen line; null while the lines are unknown, or when the plant has none. */
  lineId: number | null;
  line: LineView | null;
  lines: LineView[];
  isLoading: boolean;
  error: unknown;
  /** Tells that the page's thing belongs to this line. */
  showLine: (lineId: number) => void;
}

const LineContext = createContext<LineContextValue | null>(null);

export function useLine(): LineContextValue {
  const value = useContext(LineContext);
  if (value === null) throw new Error('useLine stands outside the LineProvider.');
  return value;
}

/** For a page about one thing (a lot, a hold, a channel): sets the strip to its line, and the plant to its plant, once they are known. */
export function useShowsLine(lineId: number | undefined, plantId?: number): void {
  const { showLine } = useLine();
  const { plant, choosePlant } = useSession();
  useEffect(() => {
    if (plantId !== undefined && plantId !== plant.id) choosePlant(plantId);
    if (lineId !== undefined) showLine(lineId);
  }, [lineId, plantId, plant.id, showLine, choosePlant]);
}

export const linesKey = (plantId: number) => ['plants', plantId, 'lines'] as const;

const REFRESH_MS = 30_000;

/** The chosen line: in the address (`?line=` or `/lines/:id/…`), else the page's own, else the remembered one, else the first. */
export function LineProvider({ children }: { children: ReactNode }) {
  const { plant, lineIds } = useSession();
  const { pathname } = useLocation();
  const [search] = useSearchParams();
  const storageKey = `ebbline.line.${plant.id}`;
  const [shownLine, setShownLine] = useState<{ pathname: string; lineId: number } | null>(null);
  const query = useQuery({
    queryKey: linesKey(plant.id),
    queryFn: ({ signal }) => apiList<LineView>(`/plants/${plant.id}/lines`, signal),
    refetchInterval: REFRESH_MS,
  });
  const lines = query.data;
  const lineId = chooseLine(lines ?? [], [
    lineIdInAddress(pathname, search.get('line')),
    shownLine?.pathname === pathname ? shownLine.lineId : null,
    Number(readStored(storageKey)),
    ...lineIds,
  ]);

  useEffect(() => {
    if (lineId !== null) writeStored(storageKey, String(lineId));
  }, [lineId, storageKey]);

  const value = useMemo(
    () => ({
      lineId,
      line: lines?.find((line) => line.id === lineId) ?? null,
      lines: lines ?? [],
      isLoading: query.isPending,
      error: query.error,
      showLine: (id: number) => setShownLine({ pathname: window.location.pathname, lineId: id }),
    }),
    [lineId, lines, query.isPending, query.error],
  );
  return <LineContext value={value}>{children}</LineContext>;
}

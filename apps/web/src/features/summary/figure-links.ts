import type { Disposition, LocalDate, SummaryNotScored } from '@app/contracts';
import { type LotFilters, urls } from '../../app/urls';
import { lastDay } from './week';

/** A figure of the week's table; the part of the decided lots is told by its disposition. */
export type Figure =
  'measured' | 'scored' | 'notFullyScored' | 'held' | 'stillOpen' | { disposition: Disposition } | UnscoredLots;

export type UnscoredLots = Pick<SummaryNotScored, 'channel' | 'reason'>;

const OF_FIGURE: Record<Extract<Figure, string>, LotFilters> = {
  measured: { by: 'ended', state: 'measured' },
  scored: { by: 'ended', state: 'scored' },
  notFullyScored: { by: 'ended', state: 'not_fully_scored' },
  held: { by: 'held' },
  stillOpen: { by: 'open' },
};

/** The list of just those lots that a figure counts, of one line or (null) of all. */
export function figureLink(figure: Figure, lineId: number | null, startsOn: LocalDate): string {
  return urls.lots({ line: lineId, from: startsOn, to: lastDay(startsOn), ...filtersOf(figure) });
}

function filtersOf(figure: Figure): LotFilters {
  if (typeof figure === 'string') return OF_FIGURE[figure];
  if ('disposition' in figure) return { by: 'decided', disposition: figure.disposition };
  return { by: 'ended', notScoredOn: figure.channel.id, notScoredFor: figure.reason };
}

import { urls, withQuery } from '../urls';

/** "3 held", "none held". */
export function heldWords(count: number): string {
  return count === 0 ? 'none held' : `${count} held`;
}

/** Where choosing another line leads: to the page of the same kind, if the page is a line's, else to the desk. */
export function sameForLine(location: { pathname: string; search: string }, lineId: number): string {
  const ofLine = /^\/lines\/\d+\/(intakes|channels)/.exec(location.pathname)?.[1];
  if (ofLine === 'intakes') return urls.intakes(lineId);
  if (ofLine === 'channels' || location.pathname.startsWith('/channels/')) return urls.channels(lineId);
  if (location.pathname.startsWith('/intakes/')) return urls.intakes(lineId);
  if (location.pathname === '/lots') {
    const filters = Object.fromEntries(new URLSearchParams(location.search));
    return withQuery('/lots', { ...filters, line: lineId, page: null });
  }
  if (location.pathname.startsWith('/lots/')) return urls.lots({ line: lineId });
  return urls.desk(lineId);
}

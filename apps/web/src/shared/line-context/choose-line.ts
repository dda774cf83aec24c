/** The line that an address names, by its path or its query. */
export function lineIdInAddress(pathname: string, lineInQuery: string | null): number | null {
  const inPath = /^\/lines\/(\d+)(\/|$)/.exec(pathname)?.[1];
  const text = inPath ?? lineInQuery;
  return text !== null && /^\d+$/.test(text) ? Number(text) : null;
}

/** The first of the wishes that is a line of the plant, else the plant's first line. */
export function chooseLine(lines: readonly { id: number }[], wishes: readonly (number | null)[]): number | null {
  const wish = wishes.find((id) => id !== null && lines.some((line) => line.id === id));
  return wish ?? lines.at(0)?.id ?? null;
}

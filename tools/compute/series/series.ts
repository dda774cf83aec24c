/** The rows of a series in the order of the file. */
export interface Series {
  /** The number as it stands, or seconds since 1970-01-01 UTC. */
  t: Float64Array;
  y: Float64Array;
  /** >= 0; all 1 where there is no column w. */
  w: Float64Array;
  /** Index into lotNames of each row; undefined where there is no column lot. */
  lot?: Int32Array;
  /** In the order in which the file names them. */
  lotNames: string[];
  timeKind: 'number' | 'iso';
  /** Rows whose ISO time has no zone. */
  zonelessCount: number;
}

/** The number that a spreadsheet would show beside a row: the header is row 1. */
export const fileRow = (index: number): number => index + 2;

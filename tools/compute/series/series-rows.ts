import { InputError, quoted } from '../input-error';
import { GrowingNumbers } from './growing-numbers';
import { parseNumber } from './parse-number';
import { parseTime, type ParsedTime } from './parse-time';
import type { Columns } from './read-header';
import type { Series } from './series';

const KINDS = { number: 'a number', iso: 'an ISO time' };

/** Checks and collects rows. */
export class SeriesRows {
  private readonly t = new GrowingNumbers();
  private readonly y = new GrowingNumbers();
  private readonly w = new GrowingNumbers();
  private readonly lot = new GrowingNumbers();
  private readonly lots = new Map<string, number>();
  private timeKind?: ParsedTime['kind'];
  private firstRow = 0;
  private zonelessCount = 0;

  constructor(private readonly columns: Columns) {}

  /** @throws InputError naming the row */
  add(fields: readonly string[], row: number): void {
    const { columns } = this;
    if (fields.length !== columns.count) throw countProblem(fields.length, columns.count, row);
    this.t.push(this.readTime(fields[columns.t], row));
    this.y.push(readValue('y', fields[columns.y], row));
    const w = columns.w < 0 ? 1 : readValue('w', fields[columns.w], row);
    if (!(w >= 0)) throw new InputError(`row ${row}: w is negative: ${quoted(fields[columns.w])}`);
    this.w.push(w);
    if (columns.lot >= 0) this.lot.push(this.lotIndex(fields[columns.lot], row));
  }

  finish(): Series {
    return {
      t: this.t.toArray(),
      y: this.y.toArray(),
      w: this.w.toArray(),
      lot: this.columns.lot < 0 ? undefined : Int32Array.from(this.lot.toArray()),
      lotNames: [...this.lots.keys()],
      timeKind: this.timeKind ?? 'number',
      zonelessCount: this.zonelessCount,
    };
  }

  private readTime(text: string, row: number): number {
    if (text === '') throw new InputError(`row ${row}: t is empty`);
    const time = parseTime(text);
    if (time === undefined)
      throw new InputError(`row ${row}: t is neither a number nor an ISO time that exists: ${quoted(text)}`);
    if (this.timeKind === undefined) {
      this.timeKind = time.kind;
      this.firstRow = row;
    }
    if (time.kind !== this.timeKind)
      throw new InputError(
        `row ${row}: t is ${KINDS[time.kind]} where row ${this.firstRow} has ${KINDS[this.timeKind]}: ${quoted(text)}`,
      );
    if (time.isZoneless) this.zonelessCount++;
    return time.seconds;
  }

  private lotIndex(name: string, row: number): number {
    if (name === '') throw new InputError(`row ${row}: lot is empty`);
    const known = this.lots.get(name);
    if (known !== undefined) return known;
    this.lots.set(name, this.lots.size);
    return this.lots.size - 1;
  }
}

function readValue(column: string, text: string, row: number): number {
  if (text === '') throw new InputError(`row ${row}: ${column} is empty; leave the row out`);
  const value = parseNumber(text);
  if (value === undefined) {
    const hint = /^[+-]?\d+,\d+$/.test(text) ? ' (write a point in decimals)' : '';
    throw new InputError(`row ${row}: ${column} is not a number: ${quoted(text)}${hint}`);
  }
  if (!Number.isFinite(value)) throw new InputError(`row ${row}: ${column} is too large: ${quoted(text)}`);
  return value;
}

function countProblem(found: number, wanted: number, row: number): InputError {
  const hint = found > wanted ? ' (a decimal comma? write a point)' : '';
  return new InputError(
    `row ${row} has ${found} ${found === 1 ? 'field' : 'fields'} where the header names ${wanted}${hint}`,
  );
}

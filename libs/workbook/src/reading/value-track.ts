import type { ValueAnswer } from '../answers';
import type { ChannelContext } from '../types';
import type { SampleValue } from './value-fit';
import { Tokens } from './values';

/** So many of a column's first values show where they lie. */
const SAMPLE = 64;
/** More different codes than instruments have. */
const MAX_CODES = 20;
/** How many times the spread of the other values a code is away from them, at least. */
const FAR_SPREADS = 3;
/** And how much of their size. */
const FAR_SHARE = 0.5;
/** Fewer values beside a 0 do not tell that it is far from them. */
const LEAST_BESIDE_ZERO = 3;

/** Numbers that instruments and people write instead of a reading: 0, three to eight nines, the ends of 16 bits. */
const CODES = new Set([0, 32_767, 32_768, 65_535]);
for (let digits = 3; digits <= 8; digits += 1) {
  const nines = '9'.repeat(digits);
  for (let whole = 1; whole <= digits; whole += 1) CODES.add(Number(`${nines.slice(0, whole)}.${nines.slice(whole)}`));
}

export interface SuspectCode {
  value: number;
  count: number;
  firstRow: number;
  /** Of the other values. */
  least: number;
  most: number;
}

/** What one channel's values in one column have shown so far, in memory that does not grow with them. */
export class ValueTrack {
  readonly sample: SampleValue[] = [];
  count = 0;
  private readonly codes = new Map<number, { count: number; firstRow: number }>();
  private readonly readings: Tokens;
  private others = 0;
  private least = Infinity;
  private most = -Infinity;

  constructor(
    readonly channel: ChannelContext,
    /** What is in force for these values. */
    readonly answer: ValueAnswer,
    readonly missing: Tokens,
  ) {
    this.readings = new Tokens(answer.readings);
  }

  /** @param value as it stands in the workbook */
  note(value: number, product: string | null, row: number): void {
    this.count += 1;
    if (CODES.has(Math.abs(value)) && !this.readings.hasNumber(value)) {
      const code = this.codes.get(value);
      if (code) code.count += 1;
      else if (this.codes.size < MAX_CODES) this.codes.set(value, { count: 1, firstRow: row });
      return;
    }
    this.others += 1;
    if (value < this.least) this.least = value;
    if (value > this.most) this.most = value;
    if (this.sample.length < SAMPLE) this.sample.push({ value, product });
  }

  /** The most frequent number that looks like a code and is far from all other values. */
  suspectCode(): SuspectCode | null {
    const { least, most } = this;
    if (this.others === 0) return null;
    const suspects = [...this.codes]
      .map(([value, code]) => ({ value, ...code, least, most }))
      .filter(({ value }) => this.isFar(value));
    return suspects.sort((one, other) => other.count - one.count)[0] ?? null;
  }

  private isFar(code: number): boolean {
    if (code === 0 && this.others < LEAST_BESIDE_ZERO) return false;
    const distance = Math.max(this.least - code, code - this.most);
    const size = Math.max(Math.abs(this.least), Math.abs(this.most));
    return distance > FAR_SPREADS * (this.most - this.least) && distance > FAR_SHARE * size;
  }
}

import Decimal from 'decimal.js';
import type { MathJsInstance, Unit } from 'mathjs';
import { foldUnit, isSameUnit } from './names';
import { DEFINITIONS, toExpression, USUAL_UNITS } from './unit-symbols';

/** Digits of the factors; a product of a double and one of them is then rounded once. */
const DIGITS = 40;
const Exact = Decimal.clone({ precision: DIGITS });

/** How values in one unit become values in another of the same quantity. */
export interface Conversion {
  /** value · factor + offset, computed in decimals and rounded once to the nearest double. */
  convert: (value: number) => number;
  /** "× 1000", "÷ 25.4", or an example where the zeros differ. */
  said: string;
}

/** How the unit in which values stand relates to the unit in which they are wanted. */
export type UnitRelation =
  { kind: 'same' } | { kind: 'convertible'; conversion: Conversion } | { kind: 'other-quantity' } | { kind: 'unknown' };

const relations = new Map<string, UnitRelation>();
let math: MathJsInstance | undefined;

/**
 * Relates two units by their spelling; what they stand for comes from mathjs (and `DEFINITIONS`), which is loaded when two
 * known units differ. "C" and "F" are temperatures where the other unit is one.
 *
 * @example relateUnits('mm', 'µm') // convertible, × 1000
 */
export function relateUnits(from: string, to: string): UnitRelation {
  const key = `${from}\n${to}`;
  let relation = relations.get(key);
  if (!relation) {
    relation = relate(from, to);
    if (relations.size < 1_000) relations.set(key, relation);
  }
  return relation;
}

function relate(from: string, to: string): UnitRelation {
  if (isSameUnit(from, to)) return { kind: 'same' };
  const [one, other] = [foldUnit(from), foldUnit(to)];
  const source = toExpression(asTemperature(one, other)) ?? toExpression(foldUnit(withDots(from)));
  const target = toExpression(asTemperature(other, one)) ?? toExpression(foldUnit(withDots(to)));
  if (source === null || target === null) return { kind: 'unknown' };
  const unit = (value: number, expression: string): Unit => loadMath().unit(loadMath().bignumber(value), expression);
  if (!unit(1, source).equalBase(unit(1, target))) return { kind: 'other-quantity' };
  const at = (value: number): Decimal => new Exact(String(unit(value, source).toNumeric(target)));
  const offset = at(0);
  const factor = at(1).minus(offset);
  if (factor.equals(1) && offset.isZero()) return { kind: 'same' };
  const convert = (value: number): number => new Exact(value).times(factor).plus(offset).toNumber();
  return { kind: 'convertible', conversion: { convert, said: say(factor, offset, convert, from, to) } };
}

/** "mPa s" is a product. */
const withDots = (unit: string): string => unit.trim().replace(/(?<=\p{L}) +(?=\p{L})/gu, '·');

const asTemperature = (unit: string, other: string): string =>
  /^[CF]$/i.test(unit) && /^(°[CF]|K)$/.test(other) ? `°${unit.toUpperCase()}` : unit;

function say(factor: Decimal, offset: Decimal, convert: (value: number) => number, from: string, to: string): string {
  const short = (number: Decimal): string => number.toSignificantDigits(10).toString();
  if (!offset.isZero()) return `for example, 100 ${from} is ${short(new Exact(convert(100)))} ${to}`;
  const inverse = new Exact(1).div(factor);
  return factor.lessThan(1) && inverse.equals(inverse.toSignificantDigits(10))
    ? `÷ ${short(inverse)}`
    : `× ${short(factor)}`;
}

/** Units of the trade of the same quantity as `unit` in other spellings than it, `unit` itself not among them. */
export const unitsLike = (unit: string): string[] =>
  USUAL_UNITS.filter((usual) => relateUnits(usual, unit).kind === 'convertible');

/** mathjs in the one file that is quick to load, and only when it is needed: whole it takes a second and 75 MB. */
function loadMath(): MathJsInstance {
  if (math) return math;
  // eslint-disable-next-line @typescript-eslint/no-require-imports
  const bundle = require('mathjs/lib/browser/math.js') as typeof import('mathjs');
  const loaded = bundle.create({}, { number: 'BigNumber', precision: DIGITS });
  loaded.createUnit('ratioOfOne');
  for (const [name, definition] of Object.entries(DEFINITIONS)) {
    loaded.createUnit({ [name]: definition }, { override: true } as never);
  }
  return (math = loaded);
}

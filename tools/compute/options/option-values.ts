import { InputError, quoted } from '../input-error';
import { parseNumber } from '../series/parse-number';

export function readNumber(name: string, text: string): number {
  const value = parseNumber(text);
  if (value === undefined || !Number.isFinite(value))
    throw new InputError(`--${name} is not a number: ${quoted(text)}`);
  return value;
}

export function readPositive(name: string, text: string): number {
  const value = readNumber(name, text);
  if (!(value > 0)) throw new InputError(`--${name} must be above 0: ${quoted(text)}`);
  return value;
}

export function readWhole(name: string, text: string, from: number, to: number): number {
  const value = readNumber(name, text);
  if (!(Number.isInteger(value) && value >= from && value <= to)) {
    const range = to === Infinity ? `from ${from} on` : `from ${from} to ${to}`;
    throw new InputError(`--${name} must be a whole number ${range}: ${quoted(text)}`);
  }
  return value;
}

/** lambda > 0, or inf for the straight line. */
export function readLambda(text: string): number {
  return /^\+?inf(inity)?$/i.test(text) ? Infinity : readPositive('lambda', text);
}

export function readWord<T extends string>(name: string, text: string, words: readonly T[]): T {
  const word = words.find((candidate) => candidate === text);
  if (word === undefined) throw new InputError(`--${name} is one of ${words.join(', ')}; not ${quoted(text)}`);
  return word;
}

export function readTimes(text: string): string[] {
  const times = text.split(',').map((time) => time.trim());
  if (times.some((time) => time === '')) throw new InputError(`--project has an empty time: ${quoted(text)}`);
  return times;
}

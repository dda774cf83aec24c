import { InputError } from '../input-error';
import type { Method } from './fit-options';

/** Options as they were written: value by name; those without a value have an empty one. */
export type GivenOptions = ReadonlyMap<string, string>;

/** Pairs that each say how smooth the baseline is. */
const RIVALS: readonly (readonly [string, string])[] = [
  ['lambda', 'edf'],
  ['lambda', 'knots'],
  ['lambda', 'degree'],
  ['lambda', 'choose'],
  ['lambda', 'one-standard-error'],
  ['edf', 'knots'],
  ['edf', 'degree'],
  ['edf', 'choose'],
  ['edf', 'one-standard-error'],
  ['knots', 'degree'],
  ['knots', 'choose'],
  ['knots', 'one-standard-error'],
  ['degree', 'choose'],
  ['degree', 'one-standard-error'],
];

const KNOTTED: readonly Method[] = ['natural-spline', 'b-spline'];
const SMOOTH: readonly Method[] = ['smoothing-spline', ...KNOTTED, 'polynomial'];

/** Options that only some methods know, and why. */
const METHODS_OF: Readonly<Record<string, { methods: readonly Method[]; why: string }>> = {
  lambda: { methods: ['smoothing-spline'], why: 'only the smoothing spline has a penalty' },
  knots: { methods: KNOTTED, why: 'only natural-spline and b-spline have knots to place' },
  placement: { methods: KNOTTED, why: 'only natural-spline and b-spline have knots to place' },
  degree: { methods: ['polynomial'], why: 'only a polynomial has a degree' },
  edf: { methods: SMOOTH, why: 'a constant has one degree of freedom' },
  choose: { methods: SMOOTH, why: 'a constant leaves nothing to choose' },
  'one-standard-error': { methods: SMOOTH, why: 'a constant leaves nothing to choose' },
};

/** @throws InputError that names both options, for the first contradiction. */
export function refuseContradictions(given: GivenOptions, method: Method): void {
  const written = (name: string) => (given.get(name) ? `--${name} ${given.get(name)}` : `--${name}`);
  const methodWritten = given.has('method') ? `--method ${method}` : `--method ${method} (the default)`;
  for (const [one, other] of RIVALS) {
    if (given.has(one) && given.has(other))
      throw new InputError(`--${one} and --${other} contradict each other: each says how smooth the baseline is`);
  }
  for (const [name, { methods, why }] of Object.entries(METHODS_OF)) {
    if (given.has(name) && !methods.includes(method))
      throw new InputError(`${written(name)} contradicts ${methodWritten}: ${why}`);
  }
  const criterion = given.get('choose');
  if (criterion === 'reml' && method !== 'smoothing-spline')
    throw new InputError(`--choose reml contradicts ${methodWritten}: only the smoothing spline has a prior`);
  if (criterion !== undefined && criterion !== 'lot-cv' && given.has('one-standard-error'))
    throw new InputError(
      `--choose ${criterion} contradicts --one-standard-error: only lot-cv is a mean over lots that has a standard error`,
    );
}

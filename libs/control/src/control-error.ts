/** Input that a computation cannot take. Data that is merely too little gives a tagged result instead. */
export class ControlError extends Error {
  constructor(
    readonly code: 'insufficient-data' | 'non-finite' | 'bad-argument',
    message: string,
  ) {
    super(message);
    this.name = 'ControlError';
  }
}

/** @throws ControlError insufficient-data below `least` values, non-finite */
export function requireFinite(values: ArrayLike<number>, least: number): void {
  if (!(values.length >= least))
    throw new ControlError('insufficient-data', `At least ${least} values are needed, there are ${values.length}.`);
  for (let i = 0; i < values.length; i += 1)
    if (!Number.isFinite(values[i])) throw new ControlError('non-finite', `Value ${i} is not a finite number.`);
}

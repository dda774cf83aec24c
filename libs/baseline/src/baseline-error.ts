/** Why a baseline could not be computed. */
export type BaselineErrorCode =
  'insufficient-data' | 'non-finite' | 'not-increasing' | 'ill-posed' | 'bad-argument' | 'no-projection';

/** Thrown by every function of this lib for input that has no answer; nothing here ever answers NaN. */
export class BaselineError extends Error {
  constructor(
    readonly code: BaselineErrorCode,
    message: string,
  ) {
    super(message);
    this.name = 'BaselineError';
  }
}

import { DomainError } from '@app/contracts';

/** Too many tries: the answer says, in its header too, after how many seconds the next one counts. */
export class RetryLaterError extends DomainError {
  constructor(
    code: string,
    detail: string,
    readonly seconds: number,
  ) {
    super('too_many', code, detail);
  }
}

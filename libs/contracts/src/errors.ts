/** What went wrong, told so that a person can act on it. The HTTP layer maps `kind` to a status. */
export type ErrorKind =
  | 'invalid'
  | 'unauthenticated'
  | 'forbidden'
  | 'not_found'
  | 'gone'
  | 'conflict'
  | 'too_large'
  | 'unprocessable'
  | 'too_many';

/** One field's error: `pointer` is a JSON pointer into the request body, such as `/reason`. */
export interface FieldError {
  pointer: string;
  code: string;
  detail: string;
}

/** The one error that our own code throws on purpose. `code` is stable kebab-case, `detail` a sentence: what, where, what to do. */
export class DomainError extends Error {
  constructor(
    readonly kind: ErrorKind,
    readonly code: string,
    readonly detail: string,
    readonly fields: FieldError[] = [],
  ) {
    super(`${code}: ${detail}`);
    this.name = 'DomainError';
  }
}

/** The answer of every failed request (RFC 9457, application/problem+json). */
export interface ProblemBody {
  type: string;
  title: string;
  status: number;
  detail: string;
  code: string;
  correlationId: string;
  errors: FieldError[];
}

import { randomUUID } from 'node:crypto';
import { STATUS_CODES } from 'node:http';
import { DomainError, type ErrorKind, type FieldError, type ProblemBody } from '@app/contracts';

const STATUS_OF_KIND: Record<ErrorKind, number> = {
  invalid: 400,
  unauthenticated: 401,
  forbidden: 403,
  not_found: 404,
  gone: 410,
  conflict: 409,
  too_large: 413,
  unprocessable: 422,
  too_many: 429,
};

/** What is said of requests that fail before any code of ours runs. */
const DETAILS: Record<number, { code: string; detail: string }> = {
  400: { code: 'bad-request', detail: 'The request could not be read.' },
  401: { code: 'not-signed-in', detail: 'Sign in first.' },
  403: { code: 'forbidden', detail: 'You may not do that.' },
  404: { code: 'not-found', detail: 'There is nothing at this address.' },
  413: { code: 'too-large', detail: 'The request is larger than is taken here.' },
  503: { code: 'not-ready', detail: 'The database cannot be reached just now. Try again in a moment.' },
  415: { code: 'unsupported-media-type', detail: 'The request is of a kind that is not taken here.' },
};

export interface Problem {
  status: number;
  code: string;
  detail: string;
  errors: FieldError[];
}

const UNKNOWN: Problem = {
  status: 500,
  code: 'internal-error',
  detail: 'Something went wrong here. Try again; if it stays so, tell the administrator the number below.',
  errors: [],
};

/** Any thrown thing as what the client is told of it; nothing of an unknown error is told. */
export function problemOf(error: unknown): Problem {
  if (error instanceof DomainError)
    return { status: STATUS_OF_KIND[error.kind], code: error.code, detail: error.detail, errors: error.fields };
  const status = statusOf(error);
  if (status === undefined || (status >= 500 && status !== 503)) return UNKNOWN;
  const known = DETAILS[status] ?? { code: 'request-failed', detail: `${STATUS_CODES[status] ?? 'Request failed'}.` };
  return { status, ...known, errors: [] };
}

/** Nest's exceptions and those of Express's own parsers carry a status. */
function statusOf(error: unknown): number | undefined {
  if (typeof error !== 'object' || error === null) return undefined;
  const { getStatus, status } = error as { getStatus?: unknown; status?: unknown };
  const value: unknown = typeof getStatus === 'function' ? getStatus.call(error) : status;
  return typeof value === 'number' && value >= 400 ? value : undefined;
}

export function problemBody(problem: Problem, correlationId: string = randomUUID()): ProblemBody {
  return {
    type: 'about:blank',
    title: STATUS_CODES[problem.status] ?? 'Error',
    status: problem.status,
    detail: problem.detail,
    code: problem.code,
    correlationId,
    errors: problem.errors,
  };
}

import type { FieldError, ProblemBody } from '@app/contracts';

/** A request that failed, as the API tells it (problem+json), or as the network did (status 0). */
export class ApiProblem extends Error {
  readonly status: number;
  readonly code: string;
  readonly detail: string;
  readonly correlationId: string | null;
  readonly errors: FieldError[];

  constructor(body: Partial<ProblemBody> & { status: number }) {
    const detail = body.detail ?? body.title ?? 'The request failed.';
    super(detail);
    this.name = 'ApiProblem';
    this.status = body.status;
    this.code = body.code ?? 'unknown';
    this.detail = detail;
    this.correlationId = body.correlationId ?? null;
    this.errors = Array.isArray(body.errors) ? body.errors : [];
  }
}

/** Anything thrown, as a problem that can be shown. */
export function asProblem(error: unknown): ApiProblem {
  if (error instanceof ApiProblem) return error;
  return new ApiProblem({
    status: 0,
    code: 'unexpected',
    detail: error instanceof Error ? `This page failed: ${error.message}` : 'This page failed.',
  });
}

export async function problemOf(response: Response): Promise<ApiProblem> {
  const body = (await response.json().catch(() => null)) as Partial<ProblemBody> | null;
  return new ApiProblem({ title: titleOf(response.status), ...body, status: response.status });
}

export const unreachable = () =>
  new ApiProblem({
    status: 0,
    code: 'unreachable',
    detail: 'Ebbline’s server does not answer. Check the network, then try again.',
  });

function titleOf(status: number): string {
  if (status === 404) return 'There is no such thing here, or it is not yours to see.';
  if (status === 403) return 'Your roles at this plant do not allow that.';
  if (status === 413) return 'The file is too large.';
  return status >= 500 ? 'The server failed on this request. Try again in a minute.' : 'The request was turned down.';
}

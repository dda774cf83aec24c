import type { Response } from 'supertest';

/** The answer is a whole problem of this status and code. */
export function expectProblem(response: Response, status: number, code: string): void {
  expect({ status: response.status, type: response.headers['content-type'] }).toEqual({
    status,
    type: expect.stringContaining('application/problem+json'),
  });
  expect(response.body).toEqual({
    type: expect.any(String),
    title: expect.any(String),
    status,
    detail: expect.stringMatching(/\.$/),
    code,
    correlationId: response.headers['x-correlation-id'],
    errors: expect.any(Array),
  });
}

import { ForbiddenException, ServiceUnavailableException } from '@nestjs/common';
import { DomainError, type ErrorKind } from '@app/contracts';
import { problemBody, problemOf } from './problem';

describe('an error as a problem', () => {
  it.each<[ErrorKind, number]>([
    ['invalid', 400],
    ['unauthenticated', 401],
    ['forbidden', 403],
    ['not_found', 404],
    ['conflict', 409],
    ['too_large', 413],
    ['unprocessable', 422],
    ['too_many', 429],
  ])('of our own of the kind %s has status %d and says its code and detail', (kind, status) => {
    expect(problemOf(new DomainError(kind, 'some-code', 'What is wrong.'))).toEqual({
      status,
      code: 'some-code',
      detail: 'What is wrong.',
      errors: [],
    });
  });

  it('that nobody foresaw tells nothing of itself', () => {
    for (const error of [new Error('relation "people" does not exist'), 'text', null, { status: 502, message: 'x' }]) {
      const problem = problemOf(error);
      expect([problem.status, problem.code]).toEqual([500, 'internal-error']);
      expect(problem.detail).not.toContain('people');
    }
  });

  it("of the framework keeps its status and gets our words, not the framework's", () => {
    expect(problemOf(new ForbiddenException('inner words'))).toMatchObject({ status: 403, code: 'forbidden' });
    expect(problemOf(new ForbiddenException('inner words')).detail).not.toContain('inner');
    expect(problemOf(new ServiceUnavailableException())).toMatchObject({ status: 503, code: 'not-ready' });
    expect(problemOf({ status: 418 })).toMatchObject({ status: 418, code: 'request-failed' });
  });

  it('has a number even where the request had none', () => {
    expect(problemBody(problemOf(null)).correlationId).toMatch(/^[0-9a-f-]{36}$/);
  });
});

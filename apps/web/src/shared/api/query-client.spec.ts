import { ApiProblem } from './problem';
import { isWorthRetrying } from './query-client';

test('no answer and the server’s own failures are asked again, twice', () => {
  expect(isWorthRetrying(0, new ApiProblem({ status: 0 }))).toBe(true);
  expect(isWorthRetrying(1, new ApiProblem({ status: 503 }))).toBe(true);
  expect(isWorthRetrying(2, new ApiProblem({ status: 503 }))).toBe(false);
});

test('a refusal is final', () => {
  expect(isWorthRetrying(0, new ApiProblem({ status: 404 }))).toBe(false);
  expect(isWorthRetrying(0, new ApiProblem({ status: 409 }))).toBe(false);
});

import { apiGet, apiSend, fileNameOf } from './client';
import { ApiProblem } from './problem';
import { currentToken, keepToken, onSessionEnd, refreshToken } from './token';

type Answer = { status: number; body?: unknown };

const json = ({ status, body }: Answer) => new Response(body === undefined ? null : JSON.stringify(body), { status });

/** Answers each address from its own list, in turn. */
function serve(answers: Record<string, Answer[]>): { path: string; authorization: string | null }[] {
  const calls: { path: string; authorization: string | null }[] = [];
  global.fetch = (path, init) => {
    const address = path as string;
    calls.push({ path: address, authorization: new Headers(init?.headers).get('authorization') });
    const answer = answers[address]?.shift();
    return answer === undefined ? Promise.reject(new TypeError('no network')) : Promise.resolve(json(answer));
  };
  return calls;
}

const UNAUTHENTICATED = { status: 401, body: { code: 'not-signed-in', detail: 'Sign in first.' } };

beforeEach(() => keepToken('old'));

test('an expired token is renewed once and the request repeated', async () => {
  const calls = serve({
    '/api/lots/1': [UNAUTHENTICATED, { status: 200, body: { id: 1 } }],
    '/api/auth/refresh': [{ status: 200, body: { accessToken: 'new' } }],
  });
  await expect(apiGet('/lots/1')).resolves.toEqual({ id: 1 });
  expect(calls.map((call) => call.path)).toEqual(['/api/lots/1', '/api/auth/refresh', '/api/lots/1']);
  expect(calls[2].authorization).toBe('Bearer new');
});

test('requests at the same time share one renewal', async () => {
  const calls = serve({
    '/api/a': [UNAUTHENTICATED, { status: 200, body: 'a' }],
    '/api/b': [UNAUTHENTICATED, { status: 200, body: 'b' }],
    '/api/auth/refresh': [{ status: 200, body: { accessToken: 'new' } }],
  });
  await expect(Promise.all([apiGet('/a'), apiGet('/b')])).resolves.toEqual(['a', 'b']);
  expect(calls.filter((call) => call.path === '/api/auth/refresh')).toHaveLength(1);
});

test('a renewal that is turned down ends the session and tells it', async () => {
  const ended = jest.fn();
  const stop = onSessionEnd(ended);
  serve({ '/api/lots/1': [UNAUTHENTICATED], '/api/auth/refresh': [{ status: 401, body: {} }] });
  await expect(apiGet('/lots/1')).rejects.toMatchObject({ status: 401, code: 'not-signed-in' });
  expect(ended).toHaveBeenCalledTimes(1);
  stop();
});

test('a browser that never had a session is told so without a failure', async () => {
  serve({ '/api/auth/refresh': [{ status: 204 }] });
  keepToken(null);
  await expect(refreshToken()).resolves.toBe(false);
  expect(currentToken()).toBeNull();
});

test('a wrong password at sign-in is not answered by a renewal', async () => {
  const calls = serve({ '/api/auth/sign-in': [{ status: 401, body: { code: 'sign-in-failed', detail: 'No.' } }] });
  await expect(apiSend('POST', '/auth/sign-in', {})).rejects.toMatchObject({ code: 'sign-in-failed' });
  expect(calls).toHaveLength(1);
});

test('a problem keeps its fields, and its reference number', async () => {
  const errors = [{ pointer: '/reason', code: 'too-short', detail: 'Say why.' }];
  serve({
    '/api/holds/1/decision': [
      { status: 400, body: { code: 'invalid', detail: 'Not taken.', correlationId: 'r-1', errors } },
    ],
  });
  const error: unknown = await apiSend('POST', '/holds/1/decision', {}).catch((thrown: unknown) => thrown);
  expect(error).toBeInstanceOf(ApiProblem);
  expect(error).toMatchObject({ status: 400, detail: 'Not taken.', correlationId: 'r-1', errors });
});

test('an answer that is no problem body still says something, and no answer says so', async () => {
  serve({ '/api/x': [{ status: 502 }] });
  await expect(apiGet('/x')).rejects.toMatchObject({ status: 502, code: 'unknown', errors: [] });
  await expect(apiGet('/x')).rejects.toMatchObject({ status: 0, code: 'unreachable' });
});

test('an empty answer is undefined', async () => {
  serve({ '/api/auth/sign-out': [{ status: 204 }] });
  await expect(apiSend('POST', '/auth/sign-out')).resolves.toBeUndefined();
});

test('a download’s name is read from its header', () => {
  expect(fileNameOf('attachment; filename="lots.xlsx"')).toBe('lots.xlsx');
  expect(fileNameOf('attachment; filename="x"; filename*=UTF-8\'\'Sp%C3%A4t.xlsx')).toBe('Spät.xlsx');
  expect(fileNameOf(null)).toBeNull();
});

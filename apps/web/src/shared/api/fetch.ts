import { problemOf, unreachable } from './problem';
import { currentToken, endSession, refreshToken } from './token';

/** One request with the bearer token; a 401 is answered once by a refresh. Any answer but 2xx throws an ApiProblem. */
export async function apiFetch(path: string, init: RequestInit = {}): Promise<Response> {
  const usedToken = currentToken();
  let response = await send(path, init);
  if (response.status === 401 && !path.startsWith('/auth/')) {
    const hasNewer = currentToken() !== null && currentToken() !== usedToken;
    if (hasNewer || (await refreshed())) response = await send(path, init);
    if (response.status === 401) endSession();
  }
  if (!response.ok) throw await problemOf(response);
  return response;
}

async function refreshed(): Promise<boolean> {
  try {
    return await refreshToken();
  } catch {
    throw unreachable();
  }
}

async function send(path: string, init: RequestInit): Promise<Response> {
  const headers = new Headers(init.headers);
  if (!headers.has('accept')) headers.set('accept', 'application/json, application/problem+json, */*');
  const token = currentToken();
  if (token !== null) headers.set('authorization', `Bearer ${token}`);
  try {
    return await fetch(`/api${path}`, { ...init, headers, credentials: 'same-origin' });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw unreachable();
  }
}

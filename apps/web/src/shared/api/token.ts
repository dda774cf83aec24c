import type { SignInAnswer } from '@app/contracts';

/** The access token lives in memory only; the refresh cookie, which no script can read, brings a new one. */
let accessToken: string | null = null;
let refreshing: Promise<boolean> | null = null;
/** The answer where the browser has no refresh cookie. */
const NOBODY_SIGNED_IN = 204;
const listeners = new Set<() => void>();

export const currentToken = () => accessToken;

export function keepToken(token: string | null): void {
  accessToken = token;
}

/** Called when the session has ended while somebody was at work. */
export function onSessionEnd(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function endSession(): void {
  accessToken = null;
  listeners.forEach((listener) => listener());
}

/** Asks for a new access token; calls at the same time share one request. False: nobody is signed in. Throws when unreachable. */
export function refreshToken(): Promise<boolean> {
  refreshing ??= oneTabAtATime(requestToken).finally(() => {
    refreshing = null;
  });
  return refreshing;
}

/** The cookie rotates with each use, so two tabs must not use the same one. */
async function oneTabAtATime<T>(work: () => Promise<T>): Promise<T> {
  if (typeof navigator === 'undefined' || !('locks' in navigator)) return work();
  return await navigator.locks.request('ebbline.refresh', work);
}

async function requestToken(): Promise<boolean> {
  const response = await fetch('/api/auth/refresh', { method: 'POST', credentials: 'same-origin' });
  if (response.status >= 500 || response.status === 429) throw new Error(`refresh answered ${response.status}`);
  if (!response.ok || response.status === NOBODY_SIGNED_IN) {
    accessToken = null;
    return false;
  }
  accessToken = ((await response.json()) as SignInAnswer).accessToken;
  return true;
}

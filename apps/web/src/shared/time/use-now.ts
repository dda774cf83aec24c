import { useSyncExternalStore } from 'react';

const STEP_MS = 30_000;

/** The time in epoch milliseconds, in steps of half a minute, the same for all who ask. */
export function useNow(): number {
  return useSyncExternalStore(subscribe, snapshot);
}

const snapshot = () => Math.floor(Date.now() / STEP_MS) * STEP_MS;

function subscribe(onChange: () => void): () => void {
  const timer = setInterval(onChange, STEP_MS / 3);
  return () => clearInterval(timer);
}

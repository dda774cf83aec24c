import { apiFetch } from './fetch';
import { ApiProblem } from './problem';

const FIRST_WAIT_MS = 500;
const LONGEST_WAIT_MS = 10_000;

/**
 * Server-sent events read with fetch, so that they carry the bearer token. Each event's data is JSON. Connects again when the
 * stream breaks, until `signal` aborts; rejects when the server turns the request down (4xx).
 */
export async function apiEvents<T>(path: string, onEvent: (event: T) => void, signal: AbortSignal): Promise<void> {
  let waitMs = FIRST_WAIT_MS;
  while (!signal.aborted) {
    try {
      const response = await apiFetch(path, { signal, headers: { accept: 'text/event-stream' } });
      await readEvents(response, (data) => {
        waitMs = FIRST_WAIT_MS;
        onEvent(JSON.parse(data) as T);
      });
    } catch (error) {
      if (signal.aborted) return;
      if (error instanceof ApiProblem && error.status >= 400 && error.status < 500) throw error;
    }
    await pause(waitMs, signal);
    waitMs = Math.min(waitMs * 2, LONGEST_WAIT_MS);
  }
}

async function readEvents(response: Response, onData: (data: string) => void): Promise<void> {
  if (response.body === null) return;
  const reader = response.body.pipeThrough(new TextDecoderStream()).getReader();
  const parse = eventParser(onData);
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return;
    parse(value);
  }
}

/** Takes pieces of an event stream as they come and calls `onData` with the data of each whole event. */
export function eventParser(onData: (data: string) => void): (piece: string) => void {
  let rest = '';
  let data: string[] = [];
  return (piece) => {
    const lines = (rest + piece).split(/\r\n|\n|\r(?!$)/);
    rest = lines.pop() ?? '';
    for (const line of lines) {
      if (line.startsWith('data:')) data.push(line.slice(5).replace(/^ /, ''));
      if (line === '' && data.length > 0) {
        const whole = data.join('\n');
        data = [];
        onData(whole);
      }
    }
  };
}

function pause(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, ms);
    signal.addEventListener('abort', () => (clearTimeout(timer), resolve()), { once: true });
  });
}

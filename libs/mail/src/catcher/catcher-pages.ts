import { createServer, type Server, type ServerResponse } from 'node:http';
import { readDetails, type CaughtMessage } from './caught-message';
import { htmlPart, listView, messageView } from './catcher-views';
import type { MessageStore } from './message-store';

const PAGE_POLICY = "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'";
/** What a mail says is not ours: no script, nothing fetched from elsewhere, no origin. */
const MAIL_POLICY =
  "default-src 'none'; img-src data:; style-src 'unsafe-inline'; sandbox allow-popups allow-popups-to-escape-sandbox";

interface Answer {
  type: string;
  body: string | Buffer;
  status?: number;
  policy?: string;
  disposition?: string;
}

const html = (body: string, policy = PAGE_POLICY): Answer => ({ type: 'text/html; charset=utf-8', body, policy });
const plain = (body: string | Buffer, status = 200): Answer => ({ type: 'text/plain; charset=utf-8', body, status });
const missing = plain('There is no such mail here.', 404);

function write(
  response: ServerResponse,
  { type, body, status = 200, policy = MAIL_POLICY, disposition }: Answer,
): void {
  response.writeHead(status, {
    'content-type': type,
    'content-security-policy': policy,
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    'cache-control': 'no-store',
    ...(disposition && { 'content-disposition': disposition }),
  });
  response.end(body);
}

async function answerMail(store: MessageStore, message: CaughtMessage, rest: string[]): Promise<Answer> {
  const raw = await store.readRaw(message);
  const { headers, parts } = await readDetails(raw);
  const [view, index] = rest;
  if (view === undefined) return html(messageView(message, headers, parts));
  if (view === 'html') return html(htmlPart(message, parts), MAIL_POLICY);
  if (view === 'source') return plain(raw);
  const part = view === 'parts' ? parts[Number(index)] : undefined;
  return part ? { type: part.contentType, body: part.content, disposition: 'attachment' } : missing;
}

async function answer(store: MessageStore, url: URL): Promise<Answer> {
  const [first, id, ...rest] = url.pathname.split('/').slice(1);
  if (url.pathname === '/') return html(listView(store.list()));
  if (url.pathname === '/health') return plain('ok');
  if (url.pathname === '/messages') return { type: 'application/json', body: JSON.stringify(store.list()) };
  const message = first === 'mail' ? store.find(id) : undefined;
  return message ? answerMail(store, message, rest) : missing;
}

/**
 * The catcher's own web server: `/` and `/mail/:id` for people, `/messages` for programs (a JSON list, newest first),
 * `/mail/:id/source` for the message as it came.
 */
export function createCatcherPages(store: MessageStore): Server {
  return createServer((request, response) => {
    if (request.method !== 'GET' && request.method !== 'HEAD') {
      write(response, plain('The catcher only shows what it has.', 405));
      return;
    }
    answer(store, new URL(request.url ?? '/', 'http://catcher.invalid')).then(
      (found) => write(response, found),
      (error: Error) => write(response, plain(`This mail cannot be shown: ${error.message}`, 500)),
    );
  });
}

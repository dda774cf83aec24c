import { randomUUID } from 'node:crypto';
import type { NextFunction, Request, Response } from 'express';

const HEADER = 'x-correlation-id';

/** Gives each request the number under which its answer, its problem and its log lines are found; a caller's own is kept. */
export function correlationId(request: Request & { id?: unknown }, response: Response, next: NextFunction): void {
  const given = request.headers[HEADER];
  const id = typeof given === 'string' && /^[\w-]{8,64}$/.test(given) ? given : randomUUID();
  request.id = id;
  response.setHeader(HEADER, id);
  next();
}

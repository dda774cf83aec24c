import { type ArgumentsHost, Catch, type ExceptionFilter, Logger } from '@nestjs/common';
import { DomainError } from '@app/contracts';
import type { Request, Response } from 'express';
import { loggedPath } from './logged-path';
import { problemBody, problemOf } from './problem';
import { RetryLaterError } from './retry-later-error';

/** Every failed request answers application/problem+json (RFC 9457); an unknown error is logged whole and told bare. */
@Catch()
export class ProblemFilter implements ExceptionFilter {
  private readonly logger = new Logger('Request');

  catch(error: unknown, host: ArgumentsHost): void {
    const http = host.switchToHttp();
    const request = http.getRequest<Request & { id?: string }>();
    const response = http.getResponse<Response>();
    const problem = problemOf(error);
    if (problem.status >= 500) this.logUnknown(error, request);
    if (response.headersSent) {
      // A stream that has begun cannot become a problem; it ends, and the client sees that it was cut.
      response.destroy(error instanceof Error ? error : undefined);
      return;
    }
    if (error instanceof RetryLaterError) response.setHeader('retry-after', String(error.seconds));
    if (problem.status === 401) response.setHeader('www-authenticate', 'Bearer');
    response
      .status(problem.status)
      .type('application/problem+json')
      .send(JSON.stringify(problemBody(problem, request.id)));
  }

  private logUnknown(error: unknown, request: Request & { id?: string }): void {
    const told = error instanceof DomainError ? error.detail : error instanceof Error ? error.message : String(error);
    const stack = error instanceof Error ? error.stack : undefined;
    this.logger.error(
      `${request.method} ${loggedPath(request.path)} failed (${request.id ?? 'no number'}): ${told}`,
      stack,
    );
  }
}

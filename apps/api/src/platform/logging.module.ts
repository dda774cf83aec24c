import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { type DynamicModule, RequestMethod } from '@nestjs/common';
import type { Config } from '@app/platform';
import { LoggerModule } from 'nestjs-pino';
import { loggedPath } from './logged-path';

const SECRETS = ['req.headers.authorization', 'req.headers.cookie', 'res.headers["set-cookie"]'];

/** One JSON line a request, without bodies, queries, cookies or tokens; the demo is told of failures only. */
export function loggingModule(config: Config): DynamicModule {
  const isTest = process.env.NODE_ENV === 'test';
  return LoggerModule.forRoot({
    forRoutes: [{ path: '{*path}', method: RequestMethod.ALL }],
    pinoHttp: {
      level: isTest ? 'silent' : config.isDemo ? 'warn' : 'info',
      redact: { paths: SECRETS, remove: true },
      genReqId: (request: IncomingMessage) => (request as { id?: string }).id ?? randomUUID(),
      customLogLevel: (_request, response, error) => (error || response.statusCode >= 500 ? 'error' : 'info'),
      serializers: {
        req: (request: { id: unknown; method: string; url: string; remoteAddress: string }) => ({
          id: request.id,
          method: request.method,
          path: loggedPath(request.url),
          address: request.remoteAddress,
        }),
        res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      },
    },
  });
}

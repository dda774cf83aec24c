import type { DynamicModule, Type } from '@nestjs/common';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import type { Clock, Config } from '@app/platform';
import cookieParser from 'cookie-parser';
import { Logger } from 'nestjs-pino';
import { AppModule } from './app.module';
import { correlationId } from './platform/correlation-id';
import { securityHeaders } from './platform/security-headers';
import { describeRoutes } from './platform/swagger';
import { serveWebPages, webFolder } from './platform/web-pages';

/** The HTTP program, ready to listen (or to `init()` in a test). */
export async function createApp(
  config: Config,
  clock: Clock,
  extraImports: (Type | DynamicModule)[] = [],
): Promise<NestExpressApplication> {
  const app = await NestFactory.create<NestExpressApplication>(AppModule.register(config, clock, { extraImports }), {
    bufferLogs: true,
    bodyParser: false,
    forceCloseConnections: true,
  });
  app.useLogger(app.get(Logger));
  // It listens on loopback only, so whoever connects from there is our own proxy and may say who is behind it.
  app.set('trust proxy', 'loopback');
  app.set('query parser', 'simple');
  app.disable('x-powered-by');
  app.setGlobalPrefix('api');
  app.use(correlationId, securityHeaders(config.publicUrl), cookieParser());
  app.useBodyParser('json', { limit: '1mb' });
  describeRoutes(app);
  const pages = webFolder();
  if (pages !== undefined) serveWebPages(app, pages);
  app.enableShutdownHooks();
  return app;
}

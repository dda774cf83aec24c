import type { DynamicModule, Type } from '@nestjs/common';
import type { NestExpressApplication } from '@nestjs/platform-express';
import type { Database } from '@app/data';
import { type Config, DATABASE } from '@app/platform';
import request from 'supertest';
import { createApp } from '../../apps/api/src/create-app';
import { SettableClock } from './clock';
import { createTestDatabase } from './database';

export interface TestApp {
  /** `app.http.get('/api/plants').set(headers)` */
  http: ReturnType<typeof request>;
  database: Database;
  /** Of the database. */
  url: string;
  clock: SettableClock;
  nest: NestExpressApplication;
  close(): Promise<void>;
}

export interface TestAppOptions {
  extraImports?: (Type | DynamicModule)[];
  config?: Partial<Config>;
}

/** The HTTP program on a fresh database, at a clock that starts on a Wednesday at noon. */
export async function startTestApp({ extraImports = [], config = {} }: TestAppOptions = {}): Promise<TestApp> {
  const testDatabase = await createTestDatabase();
  const { url } = testDatabase;
  const clock = new SettableClock(new Date('2026-03-11T12:00:00Z'));
  const nest = await createApp(testConfig(url, config), clock, extraImports);
  await nest.init();
  return {
    http: request(nest.getHttpServer()),
    database: nest.get<Database>(DATABASE),
    url,
    clock,
    nest,
    close: async () => {
      await nest.close();
      await testDatabase.drop();
    },
  };
}

export function testConfig(databaseUrl: string, config: Partial<Config> = {}): Config {
  return {
    isProduction: false,
    port: 0,
    databaseUrl,
    redisUrl: null,
    smtpUrl: 'smtp://127.0.0.1:9',
    mailFrom: 'Ebbline <ebbline@marrowby.example>',
    publicUrl: 'http://127.0.0.1:3000',
    jwtSecret: 'a secret of the tests, forty characters long',
    isDemo: false,
    mailCatcherUrl: null,
    ...config,
  };
}

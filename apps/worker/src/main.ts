import 'reflect-metadata';
import { Module } from '@nestjs/common';
import { NestFactory } from '@nestjs/core';
import { PlatformModule, QueueModule, readConfig, systemClock } from '@app/platform';
import { WorkerModule } from './worker.module';

@Module({})
class WorkerProgram {}

/** `npm run start:worker`: any number of these beside the API, on a real Redis. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  if (config.redisUrl === null)
    throw new Error(
      'Ebbline cannot start a worker of its own without REDIS_URL: without Redis the API works off its own queue.',
    );
  const app = await NestFactory.createApplicationContext({
    module: WorkerProgram,
    imports: [PlatformModule.register(config, systemClock), QueueModule.register(), WorkerModule.register()],
  });
  app.enableShutdownHooks();
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});

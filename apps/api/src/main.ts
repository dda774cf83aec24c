import 'reflect-metadata';
import type { DynamicModule } from '@nestjs/common';
import { readConfig, systemClock } from '@app/platform';
import { WorkerModule } from '../../worker/src/worker.module';
import { createApp } from './create-app';

/** `npm run start:api`: routes and pages; without REDIS_URL the worker too, since its queue then lives in this process. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  const worker: DynamicModule[] = [];
  if (config.redisUrl === null) worker.push(WorkerModule.register());
  const app = await createApp(config, systemClock, worker);
  await app.listen(config.port, '127.0.0.1');
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});

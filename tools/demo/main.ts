import 'reflect-metadata';
import { join } from 'node:path';
import { NestFactory } from '@nestjs/core';
import { hash } from '@node-rs/argon2';
import { createDatabase, type Person } from '@app/data';
import { readConfig } from '@app/platform';
import { AppModule } from '../../apps/api/src/app.module';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { discardWaitingMails, type SeededPlant, seedPlant } from '../../database/seeds/plant-seed';
import { playHistory, playLastShift } from './play/play';
import { PlayClock } from './play/play-clock';
import { Stage } from './play/stage';
import { DEMO_SEED, demoEndsAt, describePlant, makeWorld, writeNewcomerWorkbooks } from './world';

const HELP = `node dist/tools/demo.js   makes the demo plant in an empty, migrated database
  DATABASE_URL, EBBLINE_DEMO_PASSWORD   required
  EBBLINE_DATA_DIR                      two workbooks to upload by hand are written into its folder workbooks
`;

async function seed(
  databaseUrl: string,
  password: string,
  startsAt: Date,
): Promise<{ plant: SeededPlant; people: Map<string, Person> }> {
  const described = describePlant();
  const database = createDatabase(databaseUrl, { min: 0, max: 1 });
  try {
    const passwordHash = await hash(password);
    const people = described.people.map((person) => ({ ...person, passwordHash }));
    const plant = await seedPlant(database, { ...described, people, isDemo: true, at: startsAt });
    const byEmail = new Map(
      people.map(({ email, name }) => [email, { id: plant.personIds.get(email) as number, name, email }]),
    );
    return { plant, people: byEmail };
  } finally {
    await database.destroy();
  }
}

/** Plays six weeks through the very services that routes and workers run, then writes the two workbooks that follow. */
async function main(): Promise<void> {
  const password = process.env.EBBLINE_DEMO_PASSWORD;
  if (process.argv.includes('--help') || !password) {
    process.stdout.write(HELP);
    process.exit(password ? 0 : 2);
  }
  const begun = performance.now();
  const config = readConfig(process.env);
  const endsAt = demoEndsAt(Date.now() / 1000);
  const world = makeWorld(DEMO_SEED, endsAt);
  const { plant, people } = await seed(config.databaseUrl, password, new Date(world.truth.schedule.startsAt * 1000));
  const clock = new PlayClock();
  const app = await NestFactory.createApplicationContext(
    AppModule.register({ ...config, redisUrl: null }, clock, {
      extraImports: [WorkerModule.register({ isMailing: false, isTellingWeeks: false })],
    }),
    { logger: ['error', 'warn'] },
  );
  const stage = new Stage(app, config.databaseUrl, clock, plant, people);
  try {
    await playHistory(stage, world, (day, days) => process.stdout.write(`  ${day} of ${days} days read and scored\n`));
    await discardWaitingMails(stage.database, plant.plantId);
    await playLastShift(stage, world);
    await stage.settle();
    if (process.env.EBBLINE_DATA_DIR)
      await writeNewcomerWorkbooks(join(process.env.EBBLINE_DATA_DIR, 'workbooks'), DEMO_SEED, endsAt);
  } finally {
    await stage.close();
    await app.close();
  }
  process.stdout.write(`  The demo plant is ready after ${Math.round((performance.now() - begun) / 1000)} s.\n`);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});

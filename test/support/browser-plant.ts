import { NestFactory } from '@nestjs/core';
import { hash } from '@node-rs/argon2';
import { createDatabase, type Person } from '@app/data';
import { readConfig } from '@app/platform';
import { AppModule } from '../../apps/api/src/app.module';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { discardWaitingMails, type SeededPlant, seedPlant } from '../../database/seeds/plant-seed';
import { PlayClock } from '../../tools/demo/play/play-clock';
import { Stage } from '../../tools/demo/play/stage';
import { DEMO_SEED, type DemoShift, describePlant, makeWorld } from '../../tools/demo/world';
import { LINE, writeShifts } from '../browser/factories/shift-workbook';
import { createTestDatabase, makeTemplate, migratedTemplate, type TestDatabase } from './database';

/** Of everybody at the played plant. */
export const PLANT_PASSWORD = 'tide table at noon';

/** Every run sees the same readings: the six weeks of the generator end at this shift change. */
const world = makeWorld(DEMO_SEED, Date.parse('2026-03-02T06:00:00Z') / 1000);
const { shifts, further } = world.truth.schedule;

/** The shift that comes next at the played plant: two of its four lots are bad. */
export const NEXT_SHIFT: DemoShift = shifts[shifts.length - 1];
/** The one after that. */
export const SHIFT_AFTER: DemoShift = further[0];

/** After the wipe of the gauge's window and without a bad lot: what the plans are proposed from. */
const PAST = shifts.slice(-36, -1);
const SHIFTS_A_WORKBOOK = 7;
const UPLOAD_DELAY_SECONDS = 20 * 60;

export const shiftWorkbook = (layout: 'long' | 'wide', ofShifts: DemoShift[]): Promise<Buffer> =>
  writeShifts(world, ofShifts, layout);

/**
 * Marrowby Works with twelve days of Coater 2 taken in, scored and judged by plans in force, through the very services that routes and
 * workers run. It is played once a run; each caller gets a copy.
 */
export async function createPlayedPlant(): Promise<TestDatabase> {
  const name = `ebbline_played_${process.pid}_${Math.round(performance.timeOrigin)}`;
  return createTestDatabase(await makeTemplate(name, play, await migratedTemplate()));
}

/** Marrowby Works as its set-up pages would leave it, before its first workbook. */
export async function createSeededPlant(): Promise<TestDatabase> {
  const database = await createTestDatabase();
  await seed(database.url);
  return database;
}

async function play(databaseUrl: string): Promise<void> {
  const { plant, people } = await seed(databaseUrl);
  const clock = new PlayClock();
  const config = readConfig({
    DATABASE_URL: databaseUrl,
    SMTP_URL: 'smtp://127.0.0.1:9',
    EBBLINE_JWT_SECRET: 'a secret of the played past, forty characters',
  });
  const app = await NestFactory.createApplicationContext(
    AppModule.register(config, clock, {
      extraImports: [WorkerModule.register({ isMailing: false, isTellingWeeks: false })],
    }),
    { logger: ['error', 'warn'] },
  );
  const stage = new Stage(app, databaseUrl, clock, plant, people);
  try {
    await playPast(stage);
    await discardWaitingMails(stage.database, plant.plantId);
  } finally {
    await stage.close();
    await app.close();
  }
}

async function seed(databaseUrl: string): Promise<{ plant: SeededPlant; people: Map<string, Person> }> {
  const described = describePlant();
  const database = createDatabase(databaseUrl, { min: 0, max: 1 });
  try {
    const passwordHash = await hash(PLANT_PASSWORD);
    const people = described.people.map((person) => ({ ...person, passwordHash }));
    const at = new Date(world.truth.schedule.startsAt * 1000);
    const plant = await seedPlant(database, { ...described, people, isDemo: false, at });
    const ids = plant.personIds;
    return {
      plant,
      people: new Map(people.map(({ email, name }) => [email, { id: ids.get(email) as number, name, email }])),
    };
  } finally {
    await database.destroy();
  }
}

async function playPast(stage: Stage): Promise<void> {
  const engineer = stage.person('engineer2@marrowby.example');
  for (let from = 0; from < PAST.length; from += SHIFTS_A_WORKBOOK) {
    const ofWorkbook = PAST.slice(from, from + SHIFTS_A_WORKBOOK);
    stage.clock.set(ofWorkbook[ofWorkbook.length - 1].endsAt + UPLOAD_DELAY_SECONDS);
    await stage.takeIn(engineer, LINE, `past-${from}.xlsx`, await shiftWorkbook('long', ofWorkbook));
  }
  const manager = stage.person('manager@marrowby.example');
  for (const channel of describePlant().lines.find((line) => line.name === LINE)?.channels ?? [])
    await stage.approvePlan(engineer, manager, stage.channelId(LINE, channel.name), 'First plan, from twelve days.');
  await stage.settle();
}

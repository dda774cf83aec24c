import path from 'node:path';
import { databaseUrl } from './cluster.mjs';
import { keepDemoPassword, readNotes, writeNotes } from './data-folder.mjs';
import { createDatabase, dropDatabase, isEmpty } from './database.mjs';
import { say, step } from './say.mjs';
import { trialEnvironment } from './trial-programs.mjs';

const NAME = 'ebbline';
const NOTES = 'seed.json';

function runBuilt(trial, { script, args = [], env = {}, ...rest }) {
  return trial.programs.run({
    name: script,
    command: process.execPath,
    args: [path.join(trial.dist, script), ...args],
    env: { ...trialEnvironment(trial), ...env },
    ...rest,
  });
}

const migrate = (trial) =>
  runBuilt(trial, {
    script: 'database/main.js',
    args: ['migrate'],
    log: trial.log('migrate.log'),
    timeoutSeconds: 600,
    onFailure: 'The database could not be brought up to date: look at the lines below.',
  });

async function seedDemo(trial) {
  const { dataDir, demoPassword: wanted } = trial.settings;
  const demoPassword = keepDemoPassword(dataDir, wanted);
  writeNotes(dataDir, NOTES, { state: 'begun' });
  await step('Making the demo plant', () =>
    runBuilt(trial, {
      script: 'tools/demo.js',
      env: { EBBLINE_DEMO_PASSWORD: demoPassword, EBBLINE_DEMO: '1' },
      log: 'inherit',
      timeoutSeconds: 900,
      onFailure: 'The demo plant could not be made: look at the lines above. Starting again begins it afresh.',
    }),
  );
  writeNotes(dataDir, NOTES, { state: 'demo' });
}

/** Of an installation without a plant: the link with which its administrator begins, until it has been used. */
export const printFirstLink = (trial) =>
  runBuilt(trial, {
    script: 'tools/first-link.js',
    args: ['--unless-used'],
    log: 'inherit',
    timeoutSeconds: 60,
    onFailure: 'The link for the administrator could not be made: look at the lines above.',
  });

/**
 * Brings the database to the newest schema and, when it has no plant, seeds it as asked. A seeding that was interrupted
 * is begun afresh: nobody can have worked in it, since the app starts only afterwards.
 */
export async function prepareDatabase(trial) {
  const { root, settings, cluster } = trial;
  const notes = readNotes(settings.dataDir, NOTES);
  const adminUrl = databaseUrl(cluster, 'postgres');
  if (notes.state === 'begun') {
    say('The demo plant was not finished last time: beginning it afresh');
    await dropDatabase(root, adminUrl, NAME);
  }
  await createDatabase(root, adminUrl, NAME);
  await migrate(trial);
  if (settings.seed === 'demo' && (await isEmpty(root, databaseUrl(cluster, NAME)))) await seedDemo(trial);
  const isDemo = readNotes(settings.dataDir, NOTES).state === 'demo';
  return { isDemo, demoPassword: readNotes(settings.dataDir, 'secrets.json').demoPassword };
}

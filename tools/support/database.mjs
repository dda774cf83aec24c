import { createRequire } from 'node:module';
import path from 'node:path';

/** Runs `work` with a connection; the driver comes from node_modules, which must be there by now. */
async function withClient(root, connectionString, work) {
  const { Client } = createRequire(path.join(root, 'package.json'))('pg');
  const client = new Client({ connectionString });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Makes the database when it is not there. */
export const createDatabase = (root, adminUrl, name) =>
  withClient(root, adminUrl, async (client) => {
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [name]);
    if (rowCount === 0) await client.query(`create database ${name}`);
  });

export const dropDatabase = (root, adminUrl, name) =>
  withClient(root, adminUrl, (client) => client.query(`drop database if exists ${name} with (force)`));

/** Whether no plant has been entered into a migrated database yet. */
export const isEmpty = (root, url) =>
  withClient(root, url, async (client) => {
    const { rows } = await client.query('select not exists (select from plants) as is_empty');
    return rows[0].is_empty;
  });

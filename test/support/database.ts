import { createHash, randomBytes } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Client } from 'pg';
import { migrateToLatest } from '../../database/migrate';

export interface TestDatabase {
  url: string;
  drop(): Promise<void>;
}

/** One key for all workers of all runs on this cluster: only one at a time makes a template. */
const TEMPLATE_LOCK = 4_710_222;

function adminUrl(): string {
  const url = process.env.TEST_DATABASE_ADMIN_URL;
  if (!url)
    throw new Error(
      'TEST_DATABASE_ADMIN_URL is missing: run this spec in a jest project that has the database set-up.',
    );
  return url;
}

function urlOf(database: string): string {
  const url = new URL(adminUrl());
  url.pathname = `/${database}`;
  return url.href;
}

async function asAdmin<T>(work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: adminUrl() });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Names the template after the bytes of the migrations, so that a cluster that outlives a run serves no stale schema. */
function templateName(): string {
  const folder = join(__dirname, '../../database/migrations');
  const hash = createHash('sha256');
  for (const name of readdirSync(folder).sort()) hash.update(name).update(readFileSync(join(folder, name)));
  return `ebbline_template_${hash.digest('hex').slice(0, 16)}`;
}

/**
 * Makes a database that others are copied from, once a cluster: under another name first, so that a half-made one is never used.
 * @param fill gets its address; with `source` it begins as a copy of that one. Nobody may be connected to it once this returns.
 */
export async function makeTemplate(
  name: string,
  fill: (url: string) => Promise<unknown>,
  source = 'template1',
): Promise<string> {
  await asAdmin(async (client) => {
    await client.query('select pg_advisory_lock($1, hashtext($2))', [TEMPLATE_LOCK, name]);
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [name]);
    if (rowCount !== 0) return;
    const unfinished = `${name}_unfinished`;
    await client.query(`drop database if exists ${unfinished} with (force)`);
    await client.query(`create database ${unfinished} template ${source}`);
    await fill(urlOf(unfinished));
    await client.query(`alter database ${unfinished} rename to ${name}`);
  });
  return name;
}

let migrated: Promise<string> | undefined;

/** Name of the template that is migrated and otherwise empty. */
export function migratedTemplate(): Promise<string> {
  return (migrated ??= makeTemplate(templateName(), migrateToLatest));
}

/** A database of its own, migrated and empty or a copy of another template, and the way to drop it. */
export async function createTestDatabase(template?: string): Promise<TestDatabase> {
  const source = template ?? (await migratedTemplate());
  const name = `ebbline_test_${randomBytes(8).toString('hex')}`;
  await asAdmin((client) => client.query(`create database ${name} template ${source}`));
  const drop = async (): Promise<void> => {
    await asAdmin((client) => client.query(`drop database if exists ${name} with (force)`));
  };
  return { url: urlOf(name), drop };
}

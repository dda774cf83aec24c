import { migrateToLatest } from './migrate';

/** `node dist/database/main.js migrate`: brings the database at DATABASE_URL to the newest schema. */
async function main(): Promise<void> {
  const url = process.env.DATABASE_URL;
  if (process.argv[2] !== 'migrate' || !url) {
    process.stderr.write('Usage: DATABASE_URL=postgres://… node dist/database/main.js migrate\n');
    process.exit(2);
  }
  const applied = await migrateToLatest(url);
  process.stdout.write(
    applied.length === 0 ? 'The schema is up to date.\n' : `Applied ${applied.length} migrations.\n`,
  );
}

main().catch((error: unknown) => {
  process.stderr.write(`Migration failed: ${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});

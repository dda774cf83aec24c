import { createDatabase } from '@app/data';
import { firstLinkLines } from './print-first-link';

const HELP = `node dist/tools/first-link.js   prints a link, good once for seven days, with which the administrator of an installation without a plant begins

  DATABASE_URL          required; migrated
  EBBLINE_PUBLIC_URL    where people reach the pages (http://127.0.0.1:PORT)
  EBBLINE_ADMIN_EMAIL   the administrator's address (administrator@localhost); it can be changed when the link is used
  --unless-used         prints nothing when the administrator has chosen a password already

The link before it ends. npm run first-link finds the database of npm start by itself; npm start prints one at every start until it has been used.
`;

async function main(): Promise<void> {
  const url = process.env.DATABASE_URL;
  const isAskedForHelp = process.argv.includes('--help');
  if (isAskedForHelp || !url) {
    process.stdout.write(HELP);
    process.exit(isAskedForHelp ? 0 : 2);
  }
  const database = createDatabase(url, { min: 0, max: 1 });
  try {
    const isOnlyWhenUnused = process.argv.includes('--unless-used');
    const lines = await firstLinkLines(database, {
      email: process.env.EBBLINE_ADMIN_EMAIL || 'administrator@localhost',
      publicUrl: process.env.EBBLINE_PUBLIC_URL || `http://127.0.0.1:${process.env.PORT ?? '3000'}`,
      at: new Date(),
      isOnlyWhenUnused,
    });
    if (lines.length > 0) process.stdout.write(`${lines.join('\n')}\n`);
    else if (!isOnlyWhenUnused)
      process.stdout.write(
        'Nothing to begin: there is a plant, or there are people, already. An administrator invites.\n',
      );
  } finally {
    await database.destroy();
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});

import { type Database, getFirstAdministrator, hasPlants, insertAccountEntry } from '@app/data';
import { issueLink } from '../../apps/api/src/auth/issue-link';

export interface FirstLinkOptions {
  email: string;
  publicUrl: string;
  at: Date;
  /** Leaves alone an administrator who has a password already. */
  isOnlyWhenUnused: boolean;
}

/** Makes the link anew and answers the lines to print; the earlier link ends. None when there is nothing to begin. */
export async function firstLinkLines(db: Database, options: FirstLinkOptions): Promise<string[]> {
  const { email, publicUrl, at, isOnlyWhenUnused } = options;
  if (await hasPlants(db)) return [];
  return db.transaction(async (tx) => {
    const first = await getFirstAdministrator(tx, email, at);
    if (!first || (first.hasBegun && isOnlyWhenUnused)) return [];
    const link = await issueLink(tx, { personId: first.personId, purpose: 'first_administrator', at, publicUrl });
    await insertAccountEntry(tx, first.personId, {
      at,
      actor: null,
      action: 'print-first-link',
      sentence: `Ebbline printed a link for ${first.email} to begin this installation.`,
    });
    return [
      'This installation has no plant yet. Its administrator begins here, with a link that works once, for seven days:',
      '',
      `  ${link.url}`,
    ];
  });
}

import type { LinkPurpose } from '@app/contracts';
import { insertPersonToken, type Transaction } from '@app/data';
import { hashOfSecret, newSecret } from './secret-tokens';

const HOUR = 3_600_000;
const LIFETIMES: Record<LinkPurpose, number> = {
  invitation: 7 * 24 * HOUR,
  password_reset: HOUR,
  first_administrator: 7 * 24 * HOUR,
};
const PATHS: Record<LinkPurpose, string> = {
  invitation: 'invitation',
  password_reset: 'password',
  first_administrator: 'invitation',
};

export interface IssuedLink {
  /** Of the token that is kept as a hash. */
  id: number;
  url: string;
  expiresAt: Date;
}

/** Makes a link that works once; the person's earlier links for the same purpose end. */
export async function issueLink(
  tx: Transaction,
  { personId, purpose, at, publicUrl }: { personId: number; purpose: LinkPurpose; at: Date; publicUrl: string },
): Promise<IssuedLink> {
  const secret = newSecret();
  const expiresAt = new Date(at.getTime() + LIFETIMES[purpose]);
  const token = { personId, purpose, tokenHash: hashOfSecret(secret), createdAt: at, expiresAt };
  const id = await insertPersonToken(tx, token);
  return { id, url: `${publicUrl.replace(/\/$/, '')}/${PATHS[purpose]}/${secret}`, expiresAt };
}

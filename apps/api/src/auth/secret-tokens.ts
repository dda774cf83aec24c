import { createHash, randomBytes } from 'node:crypto';

/** A secret of 256 bits that fits into an address. */
export const newSecret = () => randomBytes(32).toString('base64url');

/** What is kept of a secret: it is random and long, so that a plain hash tells nobody anything. */
export const hashOfSecret = (secret: string) => createHash('sha256').update(secret).digest();

import { hash, verify } from '@node-rs/argon2';

/** Minimum of the OWASP password storage cheat sheet for argon2id: 19 MiB, 2 passes, 1 lane (2 is argon2id in this library). */
const ARGON2ID = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** Of the normal form (NFKC), so that a password is the same from every keyboard. */
export function hashPassword(password: string): Promise<string> {
  return hash(password.normalize('NFKC'), ARGON2ID);
}

let nobodysHash: Promise<string> | undefined;

/** Whether the password is right. Without a hash (nobody of that name, or invited and without a password yet) it takes as long and answers no. */
export async function isPasswordRight(password: string, passwordHash: string | null | undefined): Promise<boolean> {
  nobodysHash ??= hashPassword('nobody has this password');
  const isRight = await verify(passwordHash ?? (await nobodysHash), password.normalize('NFKC'));
  return isRight && typeof passwordHash === 'string';
}

import { SetMetadata } from '@nestjs/common';
import { DomainError } from '@app/contracts';
import { type Database, findApiTokenByHash, findPerson, type Person, updateApiTokenUsed } from '@app/data';
import { hashOfSecret } from './secret-tokens';

export const IS_FOR_MACHINES = 'isForMachines';

/** A route that an API token opens as well as a sign-in does. Its service passes the whole person to AccessService. */
export const ForMachines = () => SetMetadata(IS_FOR_MACHINES, true);

/** By what an API token is known from a sign-in. */
export const API_TOKEN_PREFIX = 'ebb_';

/** The API token of an Authorization header, if it is one. */
export function apiTokenOf(authorization: string | undefined): string | undefined {
  const token = /^Bearer (\S+)$/i.exec(authorization ?? '')?.[1];
  return token?.startsWith(API_TOKEN_PREFIX) ? token : undefined;
}

/** The person for whom a token speaks, bound to its plant; undefined when the token is not in force. */
export async function personOfToken(database: Database, token: string, at: Date): Promise<Person | undefined> {
  const found = await findApiTokenByHash(database, hashOfSecret(token));
  const person = found && (await findPerson(database, found.personId));
  if (!found || !person) return undefined;
  await updateApiTokenUsed(database, found.id, at);
  return { ...person, machine: { plantId: found.plantId, name: found.name } };
}

export function notForMachines(): DomainError {
  return new DomainError(
    'forbidden',
    'not-for-tokens',
    'An API token sends workbooks and asks what became of them; for this, sign in.',
  );
}

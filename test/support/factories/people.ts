import { hashSync } from '@node-rs/argon2';
import type { Role } from '@app/contracts';
import type { Database } from '@app/data';
import type { TestApp } from '../app';
import { insertRow, LONG_AGO } from './insert';

export const PASSWORD = 'tide table at noon';
let passwordHash: string | undefined;

export interface TestPerson {
  id: number;
  name: string;
  email: string;
}

/** A person with the password above and the given roles; without roles the person is nobody at the plant. */
export async function insertPerson(
  db: Database,
  person: { email: string; name?: string; plantId?: number; roles?: Role[]; lineIds?: number[] },
): Promise<TestPerson> {
  passwordHash ??= hashSync(PASSWORD, { memoryCost: 64, timeCost: 1, parallelism: 1 });
  const name = person.name ?? person.email.split('@')[0];
  const id = await insertRow(db, 'people', {
    email: person.email,
    name,
    password_hash: passwordHash,
    created_at: LONG_AGO,
  });
  for (const role of person.roles ?? [])
    await db('memberships').insert({ plant_id: person.plantId, person_id: id, role });
  for (const lineId of person.lineIds ?? [])
    await db('line_assignments').insert({ plant_id: person.plantId, line_id: lineId, person_id: id });
  return { id, name, email: person.email };
}

/** Headers of a signed-in person, for supertest's `.set()`. */
export async function signIn(app: TestApp, email: string, password = PASSWORD): Promise<{ authorization: string }> {
  const answer = await app.http.post('/api/auth/sign-in').send({ email, password }).expect(200);
  return { authorization: `Bearer ${(answer.body as { accessToken: string }).accessToken}` };
}

import { randomUUID } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import { DomainError } from '@app/contracts';
import {
  type Database,
  deleteSessionsExpiredBefore,
  findPerson,
  findRefreshSession,
  insertAccountEntry,
  insertRefreshSession,
  type Person,
  type Transaction,
  updateFamilyRevoked,
  updateRefreshSessionUsed,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { hashOfSecret, newSecret } from './secret-tokens';

const DAY = 86_400_000;
export const REFRESH_LIFETIME = 7 * DAY;

/**
 * Two tabs of one browser share the cookie and may refresh in the same second; the second of them then comes with a token that
 * the first has just used up. Within this time it gets a token of the same family instead of ending the session for both.
 */
const TOGETHER = 10_000;

export interface RefreshedToken {
  person: Person;
  token: string;
  family: string;
}

/** Refresh tokens: each is good once, and a token used again later ends every token that came of the same sign-in. */
@Injectable()
export class RefreshTokens {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {}

  /** The first token of a new family. */
  async begin(tx: Transaction, personId: number): Promise<{ token: string; family: string }> {
    await deleteSessionsExpiredBefore(tx, new Date(this.clock.now().getTime() - REFRESH_LIFETIME));
    const family = randomUUID();
    return { token: await this.insertToken(tx, personId, family), family };
  }

  async rotate(token: string, address: string): Promise<RefreshedToken> {
    const refreshed = await this.database.transaction((tx) => this.exchange(tx, token, address));
    if (!refreshed) throw new DomainError('unauthenticated', 'session-ended', 'The session has ended. Sign in again.');
    return refreshed;
  }

  /** Sign-out: ends the family; an unknown token is as good as ended. */
  async end(token: string, address: string): Promise<void> {
    await this.database.transaction(async (tx) => {
      const session = await findRefreshSession(tx, hashOfSecret(token));
      if (!session || session.revokedAt) return;
      await updateFamilyRevoked(tx, session.family, this.clock.now());
      const person = await findPerson(tx, session.personId);
      if (person) await this.note(tx, person, 'sign-out', `${person.name} signed out.`, address);
    });
  }

  /** Undefined when the token brings nothing; it does not throw, since a revocation must be committed. */
  private async exchange(tx: Transaction, token: string, address: string): Promise<RefreshedToken | undefined> {
    const now = this.clock.now();
    const session = await findRefreshSession(tx, hashOfSecret(token));
    if (!session || session.revokedAt || session.expiresAt <= now) return undefined;
    const person = await findPerson(tx, session.personId);
    if (session.usedAt && now.getTime() - session.usedAt.getTime() > TOGETHER) {
      await updateFamilyRevoked(tx, session.family, now);
      if (person)
        await this.note(
          tx,
          person,
          'end-reused-session',
          `A session of ${person.name} was ended: what it is kept alive with came a second time.`,
          address,
        );
      return undefined;
    }
    if (!person) return undefined;
    await updateRefreshSessionUsed(tx, session.id, now);
    return { person, token: await this.insertToken(tx, session.personId, session.family), family: session.family };
  }

  private async insertToken(tx: Transaction, personId: number, family: string): Promise<string> {
    const token = newSecret();
    const issuedAt = this.clock.now();
    const expiresAt = new Date(issuedAt.getTime() + REFRESH_LIFETIME);
    await insertRefreshSession(tx, { personId, family, tokenHash: hashOfSecret(token), issuedAt, expiresAt });
    return token;
  }

  /** Reuse is told without an actor: whoever it was need not have been the person. */
  private note(tx: Transaction, person: Person, action: string, sentence: string, address: string): Promise<void> {
    const actor = action === 'sign-out' ? person : null;
    return insertAccountEntry(tx, person.id, { at: this.clock.now(), actor, action, sentence, address });
  }
}

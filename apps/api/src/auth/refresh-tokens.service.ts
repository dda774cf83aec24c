import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import { DomainError } from '@app/contracts';
import {
  type Database,
  deleteSessionsExpiredBefore,
  findPerson,
  findRefreshSession,
  insertRefreshSession,
  type Person,
  type Queryable,
  type Transaction,
  updateFamilyRevoked,
  updateRefreshSessionUsed,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';

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
}

/** Refresh tokens: each is good once, and a token used again later ends every token that came of the same sign-in. */
@Injectable()
export class RefreshTokens {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {}

  /** The first token of a new family. */
  async begin(personId: number): Promise<string> {
    await deleteSessionsExpiredBefore(this.database, new Date(this.clock.now().getTime() - REFRESH_LIFETIME));
    return this.insertToken(this.database, personId, randomUUID());
  }

  async rotate(token: string | undefined): Promise<RefreshedToken> {
    const refreshed =
      token === undefined ? undefined : await this.database.transaction((tx) => this.exchange(tx, token));
    if (!refreshed) throw new DomainError('unauthenticated', 'session-ended', 'The session has ended. Sign in again.');
    return refreshed;
  }

  /** Sign-out: ends the family; an unknown token is as good as ended. */
  async end(token: string): Promise<void> {
    await this.database.transaction(async (tx) => {
      const session = await findRefreshSession(tx, hashOf(token));
      if (session) await updateFamilyRevoked(tx, session.family, this.clock.now());
    });
  }

  /** Undefined when the token brings nothing; it does not throw, since a revocation must be committed. */
  private async exchange(tx: Transaction, token: string): Promise<RefreshedToken | undefined> {
    const now = this.clock.now();
    const session = await findRefreshSession(tx, hashOf(token));
    if (!session || session.revokedAt || session.expiresAt <= now) return undefined;
    if (session.usedAt && now.getTime() - session.usedAt.getTime() > TOGETHER) {
      await updateFamilyRevoked(tx, session.family, now);
      return undefined;
    }
    const person = await findPerson(tx, session.personId);
    if (!person) return undefined;
    await updateRefreshSessionUsed(tx, session.id, now);
    return { person, token: await this.insertToken(tx, session.personId, session.family) };
  }

  private async insertToken(db: Queryable, personId: number, family: string): Promise<string> {
    const token = randomBytes(32).toString('base64url');
    const issuedAt = this.clock.now();
    const expiresAt = new Date(issuedAt.getTime() + REFRESH_LIFETIME);
    await insertRefreshSession(db, { personId, family, tokenHash: hashOf(token), issuedAt, expiresAt });
    return token;
  }
}

const hashOf = (token: string) => createHash('sha256').update(token).digest();

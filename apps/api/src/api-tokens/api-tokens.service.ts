import { Inject, Injectable } from '@nestjs/common';
import { type ApiTokenView, DomainError, type NewApiToken } from '@app/contracts';
import {
  type ApiTokenRow,
  type Database,
  findPlant,
  insertApiToken,
  insertAuditEntry,
  listApiTokens,
  type Person,
  updateApiTokenRevoked,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { API_TOKEN_PREFIX } from '../auth/machine';
import { hashOfSecret, newSecret } from '../auth/secret-tokens';

const MOST_IN_FORCE = 20;

/** Tokens by which a person's scripts and line computers send workbooks to one plant. Each is shown once. */
@Injectable()
export class ApiTokensService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async list(person: Person, plantId: number): Promise<ApiTokenView[]> {
    await this.access.requireThing(person, await findPlant(this.database, plantId), 'upload_intake');
    return (await listApiTokens(this.database, plantId, person.id)).map(view);
  }

  async make(person: Person, plantId: number, name: string): Promise<NewApiToken> {
    await this.access.requireThing(person, await findPlant(this.database, plantId), 'upload_intake');
    const former = await listApiTokens(this.database, plantId, person.id);
    if (former.filter(({ revokedAt }) => revokedAt === null).length >= MOST_IN_FORCE)
      throw new DomainError(
        'conflict',
        'too-many-tokens',
        `You have ${MOST_IN_FORCE} tokens in force at this plant. Revoke one that is no longer used.`,
      );
    const token = `${API_TOKEN_PREFIX}${newSecret()}`;
    const at = this.clock.now();
    const row = await this.database.transaction(async (tx) => {
      const tokenHash = hashOfSecret(token);
      const made = await insertApiToken(tx, { plantId, personId: person.id, name, tokenHash, createdAt: at });
      await insertAuditEntry(tx, {
        plantId,
        at,
        actor: person,
        action: 'make-api-token',
        thingKind: 'person',
        thingId: person.id,
        sentence: `${person.name} made the API token "${name}".`,
        after: { apiTokenId: made.id, name },
      });
      return made;
    });
    return { ...view(row), token };
  }

  /** One's own; of one that is not there, or not in force any more, there is nothing left to do. */
  async revoke(person: Person, plantId: number, tokenId: number): Promise<void> {
    await this.access.requireThing(person, await findPlant(this.database, plantId), 'upload_intake');
    const token = (await listApiTokens(this.database, plantId, person.id)).find(({ id }) => id === tokenId);
    if (!token) return;
    const at = this.clock.now();
    await this.database.transaction(async (tx) => {
      if (!(await updateApiTokenRevoked(tx, tokenId, at))) return;
      await insertAuditEntry(tx, {
        plantId,
        at,
        actor: person,
        action: 'revoke-api-token',
        thingKind: 'person',
        thingId: person.id,
        sentence: `${person.name} revoked the API token "${token.name}".`,
        before: { apiTokenId: tokenId, name: token.name },
      });
    });
  }
}

const view = ({ id, name, createdAt, lastUsedAt, revokedAt }: ApiTokenRow): ApiTokenView => ({
  id,
  name,
  createdAt: createdAt.toISOString(),
  lastUsedAt: lastUsedAt?.toISOString() ?? null,
  revokedAt: revokedAt?.toISOString() ?? null,
});

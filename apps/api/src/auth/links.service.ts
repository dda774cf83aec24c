import { Inject, Injectable } from '@nestjs/common';
import {
  DomainError,
  type LinkAnswer,
  LINK_PURPOSES,
  type LinkPurpose,
  type LinkRequest,
  type LinkView,
} from '@app/contracts';
import {
  type Database,
  deleteFailures,
  findPersonToken,
  insertAccountEntry,
  type PersonToken,
  updatePassword,
  updatePerson,
  updatePersonTokensRevoked,
  updatePersonTokenUsed,
  updateSessionsRevoked,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { countUnknownLink, refuseLinkGuesser } from './attempts';
import { requireGoodPassword } from './password-rules';
import { hashPassword } from './passwords';
import { hashOfSecret } from './secret-tokens';

const DONE: Record<LinkPurpose, string> = {
  invitation: 'accepted the invitation and chose a password',
  password_reset: 'chose a new password by the link that was mailed',
  first_administrator: 'began this installation and chose a password',
};

/** Links by which somebody who is not signed in chooses a password: each works once, until it ends. */
@Injectable()
export class LinksService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {}

  async view(secret: string, address: string): Promise<LinkView> {
    const { purpose, name, email, expiresAt } = await this.require(secret, address);
    return { purpose, name, email, expiresAt: expiresAt.toISOString() };
  }

  /** Sets the password, ends every session and every other link of the person. It signs nobody in: the password does that. */
  async choosePassword(secret: string, request: LinkRequest, address: string): Promise<LinkAnswer> {
    const link = await this.require(secret, address);
    const isFirst = link.purpose === 'first_administrator';
    const name = (isFirst && request.name) || link.name;
    const email = ((isFirst && request.email) || link.email).toLowerCase();
    requireGoodPassword(request.password, { name, email });
    const passwordHash = await hashPassword(request.password);
    const at = this.clock.now();
    await this.database.transaction(async (tx) => {
      if (!(await updatePersonTokenUsed(tx, link.id, at))) throw usedLink();
      await updatePassword(tx, link.personId, passwordHash);
      await updatePerson(tx, link.personId, { name, email });
      await updatePersonTokensRevoked(tx, link.personId, LINK_PURPOSES, at);
      await updateSessionsRevoked(tx, link.personId, at);
      await deleteFailures(tx, `account:${email}`);
      await insertAccountEntry(tx, link.personId, {
        at,
        actor: { id: link.personId, name, address },
        action: link.purpose === 'password_reset' ? 'reset-password' : 'accept-invitation',
        sentence: `${name} ${DONE[link.purpose]}.`,
        ...(isFirst && { before: { name: link.name, email: link.email }, after: { name, email } }),
      });
    });
    return { email };
  }

  private async require(secret: string, address: string): Promise<PersonToken> {
    const now = this.clock.now();
    await refuseLinkGuesser(this.database, address, now);
    const found = await findPersonToken(this.database, hashOfSecret(secret));
    if (!found) {
      await countUnknownLink(this.database, address, now);
      throw new DomainError(
        'not_found',
        'link-unknown',
        'This link is not one of ours, or not whole: open it from the mail, or copy all of it.',
      );
    }
    if (found.usedAt) throw usedLink();
    if (found.revokedAt)
      throw new DomainError(
        'gone',
        'link-replaced',
        'This link was replaced by a later one, or ended. Use the newest mail.',
      );
    if (found.expiresAt <= now) throw new DomainError('gone', 'link-expired', EXPIRED[found.purpose]);
    return found;
  }
}

const usedLink = () =>
  new DomainError('gone', 'link-used', 'This link was used already. Sign in with the password that was chosen.');

const EXPIRED: Record<LinkPurpose, string> = {
  invitation: 'This invitation has expired. Ask who invited you to send it again.',
  password_reset: 'This link has expired: it works for an hour. Ask for a new one.',
  first_administrator: 'This link has expired. The next start of Ebbline, or npm run first-link, prints a new one.',
};

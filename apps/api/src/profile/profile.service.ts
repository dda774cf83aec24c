import { Inject, Injectable } from '@nestjs/common';
import {
  DomainError,
  MAIL_KIND_NAMES,
  type PasswordRequest,
  type ProfileRequest,
  type SubscriptionsRequest,
  type SubscriptionsView,
} from '@app/contracts';
import {
  type Database,
  findPlant,
  getTheme,
  insertAccountEntry,
  insertAuditEntry,
  listSubscriptions,
  type Person,
  updatePassword,
  updatePerson,
  updatePersonTokensRevoked,
  updateSessionsRevoked,
  upsertSubscriptions,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { PasswordChecks } from '../auth/password-checks.service';
import { requireGoodPassword } from '../auth/password-rules';
import { hashPassword } from '../auth/passwords';

/** What people change of their own. */
@Injectable()
export class ProfileService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly passwords: PasswordChecks,
  ) {}

  /** Names under what was signed before stay as they were printed. */
  async change(person: Person, request: ProfileRequest): Promise<void> {
    const before = { name: person.name, theme: await getTheme(this.database, person.id) };
    const after = { name: request.name ?? before.name, theme: request.theme ?? before.theme };
    const parts = [
      ...(after.name === before.name ? [] : [`is called ${after.name} now`]),
      ...(after.theme === before.theme ? [] : [`chose the theme "${after.theme}"`]),
    ];
    if (parts.length === 0) return;
    await this.database.transaction(async (tx) => {
      await updatePerson(tx, person.id, after);
      await insertAccountEntry(tx, person.id, {
        at: this.clock.now(),
        actor: person,
        action: 'change-profile',
        sentence: `${person.name} ${parts.join(' and ')}.`,
        before,
        after,
      });
    });
  }

  /** Ends every other session and every link that was mailed. */
  async changePassword(person: Person, { current, next }: PasswordRequest, session: string | undefined): Promise<void> {
    await this.passwords.verifyPassword(person.id, current, person.address, '/current');
    requireGoodPassword(next, person, '/next');
    if (next === current) {
      const detail = 'This is the password that you have now.';
      throw new DomainError('invalid', 'same-password', detail, [{ pointer: '/next', code: 'same-password', detail }]);
    }
    const passwordHash = await hashPassword(next);
    await this.database.transaction(async (tx) => {
      const at = this.clock.now();
      await updatePassword(tx, person.id, passwordHash);
      await updateSessionsRevoked(tx, person.id, at, session);
      await updatePersonTokensRevoked(tx, person.id, ['password_reset'], at);
      await insertAccountEntry(tx, person.id, {
        at,
        actor: person,
        action: 'change-password',
        sentence: `${person.name} changed their password; every other session was ended.`,
      });
    });
  }

  async signOutEverywhere(person: Person): Promise<void> {
    await this.database.transaction(async (tx) => {
      const at = this.clock.now();
      await updateSessionsRevoked(tx, person.id, at);
      await insertAccountEntry(tx, person.id, {
        at,
        actor: person,
        action: 'sign-out-everywhere',
        sentence: `${person.name} signed out everywhere.`,
      });
    });
  }

  async subscriptions(person: Person, plantId: number): Promise<SubscriptionsView> {
    const roles = await this.rolesAt(person, plantId);
    return { plantId, subscriptions: await listSubscriptions(this.database, plantId, person.id, roles) };
  }

  async changeSubscriptions(
    person: Person,
    plantId: number,
    request: SubscriptionsRequest,
  ): Promise<SubscriptionsView> {
    const roles = await this.rolesAt(person, plantId);
    const before = await listSubscriptions(this.database, plantId, person.id, roles);
    const strange = request.subscriptions.findIndex(({ kind }) => !before.some((known) => known.kind === kind));
    if (strange >= 0) {
      const detail = 'Your roles at this plant do not have this mail.';
      const pointer = `/subscriptions/${strange}/kind`;
      throw new DomainError('invalid', 'mail-not-for-role', detail, [{ pointer, code: 'mail-not-for-role', detail }]);
    }
    const changed = request.subscriptions.filter(({ kind, isWanted }) =>
      before.some((known) => known.kind === kind && known.isWanted !== isWanted),
    );
    if (changed.length > 0)
      await this.database.transaction(async (tx) => {
        await upsertSubscriptions(tx, plantId, person.id, changed);
        const words = changed.map(
          ({ kind, isWanted }) => `${isWanted ? 'wants' : 'does not want'} ${MAIL_KIND_NAMES[kind]}`,
        );
        await insertAuditEntry(tx, {
          plantId,
          at: this.clock.now(),
          actor: person,
          action: 'change-subscriptions',
          thingKind: 'person',
          thingId: person.id,
          sentence: `${person.name} ${words.join(' and ')} by mail.`,
          before: Object.fromEntries(before.map(({ kind, isWanted }) => [kind, isWanted])),
          after: Object.fromEntries(changed.map(({ kind, isWanted }) => [kind, isWanted])),
        });
      });
    return { plantId, subscriptions: await listSubscriptions(this.database, plantId, person.id, roles) };
  }

  private async rolesAt(person: Person, plantId: number) {
    const plant = await findPlant(this.database, plantId);
    return (await this.access.requireThing(person.id, plant, 'read')).roles;
  }
}

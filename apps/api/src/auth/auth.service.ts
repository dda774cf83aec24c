import { Inject, Injectable } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import { type Me, permissionsOf } from '@app/contracts';
import {
  type Database,
  getTheme,
  insertAccountEntry,
  isInstallationAdministrator,
  listMemberships,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE } from '@app/platform';
import { PasswordChecks } from './password-checks.service';
import { RefreshTokens } from './refresh-tokens.service';

const ACCESS_LIFETIME_SECONDS = 15 * 60;

export interface Tokens {
  accessToken: string;
  refreshToken: string;
}

@Injectable()
export class AuthService {
  constructor(
    private readonly passwords: PasswordChecks,
    private readonly refreshTokens: RefreshTokens,
    private readonly jwt: JwtService,
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {}

  async signIn(email: string, password: string, address: string): Promise<Tokens> {
    const person = await this.passwords.signIn(email, password, address);
    const { token, family } = await this.database.transaction(async (tx) => {
      await insertAccountEntry(tx, person.id, {
        at: this.clock.now(),
        actor: person,
        action: 'sign-in',
        sentence: `${person.name} signed in.`,
        address,
      });
      return this.refreshTokens.begin(tx, person.id);
    });
    return { accessToken: await this.accessToken(person.id, family), refreshToken: token };
  }

  async refresh(token: string, address: string): Promise<Tokens> {
    const { person, family, token: refreshToken } = await this.refreshTokens.rotate(token, address);
    return { accessToken: await this.accessToken(person.id, family), refreshToken };
  }

  async signOut(token: string | undefined, address: string): Promise<void> {
    if (token !== undefined) await this.refreshTokens.end(token, address);
  }

  async me(person: Person): Promise<Me> {
    const memberships = await listMemberships(this.database, person.id);
    return {
      id: person.id,
      name: person.name,
      email: person.email,
      theme: await getTheme(this.database, person.id),
      memberships: memberships.map(({ plantId, plantName, timeZone, roles, lineIds }) => ({
        plant: { id: plantId, name: plantName, timeZone },
        roles,
        permissions: permissionsOf(roles),
        lineIds,
      })),
      isInstallationAdministrator: await isInstallationAdministrator(this.database, person.id),
      mailCatcherUrl: this.config.isDemo ? this.config.mailCatcherUrl : null,
    };
  }

  private accessToken(personId: number, family: string): Promise<string> {
    const issuedAt = Math.floor(this.clock.now().getTime() / 1000);
    return this.jwt.signAsync({
      sub: String(personId),
      family,
      iat: issuedAt,
      exp: issuedAt + ACCESS_LIFETIME_SECONDS,
    });
  }
}

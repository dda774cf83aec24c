import { Inject, Injectable } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import { type Me, permissionsOf } from '@app/contracts';
import { type Database, listMemberships, type Person } from '@app/data';
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
    return { accessToken: await this.accessToken(person.id), refreshToken: await this.refreshTokens.begin(person.id) };
  }

  async refresh(token: string | undefined): Promise<Tokens> {
    const refreshed = await this.refreshTokens.rotate(token);
    return { accessToken: await this.accessToken(refreshed.person.id), refreshToken: refreshed.token };
  }

  async signOut(token: string | undefined): Promise<void> {
    if (token !== undefined) await this.refreshTokens.end(token);
  }

  async me(person: Person): Promise<Me> {
    const memberships = await listMemberships(this.database, person.id);
    return {
      id: person.id,
      name: person.name,
      email: person.email,
      memberships: memberships.map(({ plantId, plantName, timeZone, roles, lineIds }) => ({
        plant: { id: plantId, name: plantName, timeZone },
        roles,
        permissions: permissionsOf(roles),
        lineIds,
      })),
      mailCatcherUrl: this.config.isDemo ? this.config.mailCatcherUrl : null,
    };
  }

  private accessToken(personId: number): Promise<string> {
    const issuedAt = Math.floor(this.clock.now().getTime() / 1000);
    return this.jwt.signAsync({ sub: String(personId), iat: issuedAt, exp: issuedAt + ACCESS_LIFETIME_SECONDS });
  }
}

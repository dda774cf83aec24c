import { Inject, Injectable } from '@nestjs/common';
import { PassportStrategy } from '@nestjs/passport';
import { type Database, findPerson, isFamilyAlive, type Person } from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE } from '@app/platform';
import type { Request } from 'express';
import { ExtractJwt, Strategy } from 'passport-jwt';
import type { WithSession } from './current-person';

export interface AccessTokenPayload {
  sub: string;
  /** Of the sign-in that it came of; it ends with it. */
  family: string;
  exp: number;
}

/** Takes the bearer token; the person is read at each request, so that one who is disabled or signed out elsewhere is out at once. */
@Injectable()
export class JwtStrategy extends PassportStrategy(Strategy) {
  constructor(
    @Inject(CONFIG) config: Config,
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {
    super({
      jwtFromRequest: ExtractJwt.fromAuthHeaderAsBearerToken(),
      secretOrKey: config.jwtSecret,
      algorithms: ['HS256'],
      passReqToCallback: true,
      // Expiry is checked below, by the program's own clock.
      ignoreExpiration: true,
    });
  }

  async validate(request: Request & WithSession, payload: AccessTokenPayload): Promise<Person | null> {
    if (!(payload.exp * 1000 > this.clock.now().getTime())) return null;
    const personId = Number(payload.sub);
    if (!payload.family || !(await isFamilyAlive(this.database, personId, payload.family))) return null;
    request.sessionFamily = payload.family;
    const person = await findPerson(this.database, personId);
    return person ? { ...person, address: request.ip } : null;
  }
}

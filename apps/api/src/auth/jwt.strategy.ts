import { Inject, Injectable } from '@nestjs/common';
import { PassportStrategy } from '@nestjs/passport';
import { type Database, findPerson, type Person } from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE } from '@app/platform';
import type { Request } from 'express';
import { ExtractJwt, Strategy } from 'passport-jwt';

export interface AccessTokenPayload {
  sub: string;
  exp: number;
}

/** Takes the bearer token; the person is read at each request, so that one who is disabled is out at once. */
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

  async validate(request: Request, payload: AccessTokenPayload): Promise<Person | null> {
    if (!(payload.exp * 1000 > this.clock.now().getTime())) return null;
    const person = await findPerson(this.database, Number(payload.sub));
    return person ? { ...person, address: request.ip } : null;
  }
}

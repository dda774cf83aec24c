import { type ExecutionContext, Inject, Injectable } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { AuthGuard } from '@nestjs/passport';
import { DomainError } from '@app/contracts';
import type { Database, Person } from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import type { Request } from 'express';
import { apiTokenOf, IS_FOR_MACHINES, notForMachines, personOfToken } from './machine';
import { IS_PUBLIC } from './public';

/** Every route needs a sign-in unless it is @Public; an API token opens those that are @ForMachines. */
@Injectable()
export class JwtAuthGuard extends AuthGuard('jwt') {
  constructor(
    private readonly reflector: Reflector,
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {
    super();
  }

  override canActivate(
    context: ExecutionContext,
  ): ReturnType<InstanceType<ReturnType<typeof AuthGuard>>['canActivate']> {
    const targets = [context.getHandler(), context.getClass()];
    if (this.reflector.getAllAndOverride<boolean | undefined>(IS_PUBLIC, targets)) return true;
    const request = context.switchToHttp().getRequest<Request & { user?: Person }>();
    const token = apiTokenOf(request.headers.authorization);
    if (token === undefined) return super.canActivate(context);
    const isForMachines = this.reflector.getAllAndOverride<boolean | undefined>(IS_FOR_MACHINES, targets) ?? false;
    return this.admitMachine(request, token, isForMachines);
  }

  private async admitMachine(
    request: Request & { user?: Person },
    token: string,
    isForMachines: boolean,
  ): Promise<boolean> {
    const person = await personOfToken(this.database, token, this.clock.now());
    if (!person)
      throw new DomainError('unauthenticated', 'token-not-in-force', 'This API token is unknown or was revoked.');
    if (!isForMachines) throw notForMachines();
    request.user = { ...person, address: request.ip };
    return true;
  }

  override handleRequest<T>(error: Error | null, person: T | false): T {
    if (error) throw error;
    if (!person) throw new DomainError('unauthenticated', 'not-signed-in', 'Sign in first: there is no valid sign-in.');
    return person;
  }
}

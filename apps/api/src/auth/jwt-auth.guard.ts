import { type ExecutionContext, Injectable } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { AuthGuard } from '@nestjs/passport';
import { DomainError } from '@app/contracts';
import { IS_PUBLIC } from './public';

/** Every route needs a sign-in unless it is @Public. */
@Injectable()
export class JwtAuthGuard extends AuthGuard('jwt') {
  constructor(private readonly reflector: Reflector) {
    super();
  }

  override canActivate(
    context: ExecutionContext,
  ): ReturnType<InstanceType<ReturnType<typeof AuthGuard>>['canActivate']> {
    const targets = [context.getHandler(), context.getClass()];
    if (this.reflector.getAllAndOverride<boolean | undefined>(IS_PUBLIC, targets)) return true;
    return super.canActivate(context);
  }

  override handleRequest<T>(error: Error | null, person: T | false): T {
    if (error) throw error;
    if (!person) throw new DomainError('unauthenticated', 'not-signed-in', 'Sign in first: there is no valid sign-in.');
    return person;
  }
}

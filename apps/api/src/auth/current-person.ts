import { createParamDecorator, type ExecutionContext } from '@nestjs/common';
import type { Person } from '@app/data';
import type { Request } from 'express';

/** Who is signed in, and from where: `{id, name, email, address}`. */
export const CurrentPerson = createParamDecorator(
  (_data: unknown, context: ExecutionContext) => context.switchToHttp().getRequest<Request & { user: Person }>().user,
);

export interface WithSession {
  sessionFamily?: string;
}

/** Which of the person's sessions asks. */
export const CurrentSession = createParamDecorator(
  (_data: unknown, context: ExecutionContext) => context.switchToHttp().getRequest<WithSession>().sessionFamily,
);

export type { Person };

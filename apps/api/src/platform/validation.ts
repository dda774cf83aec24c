import { ValidationPipe } from '@nestjs/common';
import { DomainError, type FieldError } from '@app/contracts';
import type { ValidationError } from 'class-validator';

/** Checks bodies and queries against their classes; what fails has the shape of every other problem. */
export function createValidationPipe(): ValidationPipe {
  return new ValidationPipe({
    whitelist: true,
    forbidNonWhitelisted: true,
    transform: true,
    exceptionFactory: (errors) =>
      new DomainError(
        'invalid',
        'invalid-input',
        'Some of what was sent cannot be used; see each field.',
        fieldErrors(errors),
      ),
  });
}

/** class-validator's tree as a flat list of JSON pointers (RFC 6901). */
export function fieldErrors(errors: ValidationError[], parent = ''): FieldError[] {
  return errors.flatMap((error) => {
    const pointer = `${parent}/${error.property.replaceAll('~', '~0').replaceAll('/', '~1')}`;
    const own = Object.entries(error.constraints ?? {}).map(([name, message]) => ({
      pointer,
      code: name === 'whitelistValidation' ? 'unknown-field' : kebab(name),
      detail: `${message[0].toUpperCase()}${message.slice(1)}.`.replace(/\.\.$/, '.'),
    }));
    return [...own, ...fieldErrors(error.children ?? [], pointer)];
  });
}

const kebab = (name: string) => name.replaceAll(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`);

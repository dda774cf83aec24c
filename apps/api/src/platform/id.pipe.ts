import { Injectable, type PipeTransform } from '@nestjs/common';
import { DomainError } from '@app/contracts';

/** The number in an address such as /lots/12. */
@Injectable()
export class IdPipe implements PipeTransform<string, number> {
  transform(value: string): number {
    const id = Number(value);
    if (!/^\d{1,16}$/.test(value) || !Number.isSafeInteger(id) || id < 1)
      throw new DomainError('invalid', 'invalid-id', 'The number in the address is not one of a thing here.');
    return id;
  }
}

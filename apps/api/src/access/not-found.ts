import { DomainError } from '@app/contracts';

/** The one answer for what is not there and for what belongs to a plant where the person is nobody. */
export function notFound(): DomainError {
  return new DomainError('not_found', 'not-found', 'There is no such thing here.');
}

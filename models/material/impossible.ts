import { DomainError, type Facts } from '../errors.ts';

/** Refuses a line of a ledger that cannot be true. */
export function impossible(message: string, facts: Facts): never {
  throw new DomainError('event-impossible', message, facts);
}

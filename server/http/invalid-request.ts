import { DomainError } from '../../models/errors.ts';
import type { Problem } from '../contract/problem.ts';

/** A request that does not fit its schema, with every place where it does not. */
export class InvalidRequest extends DomainError {
  readonly errors: NonNullable<Problem['errors']>;

  constructor(errors: NonNullable<Problem['errors']>) {
    const [first] = errors;
    super('invalid-request', first === undefined ? 'The request does not fit' : `${first.pointer}: ${first.detail}`);
    this.errors = errors;
  }
}

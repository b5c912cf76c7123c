import { DomainError } from '../../models/errors.ts';

/** A number that stands in an address. What is none leads nowhere. */
export function numberIn(params: Readonly<Record<string, string>>, name: string): number {
  const written = params[name] ?? '';
  if (/^[1-9]\d{0,14}$/.test(written)) return Number(written);
  throw new DomainError('not-found', `"${written}" is not the number of a ${name}`, { [name]: written });
}

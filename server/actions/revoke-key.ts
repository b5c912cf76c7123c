import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { markKeyRevoked, requireKey } from '../store/sender-keys.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Takes a key out of use for good; what was pushed with it stays. */
export function revokeKey(parts: ActionParts, vessel: string, id: number, reason: string): void {
  const { db } = parts;
  db.transaction(() => {
    const { name, revoked } = requireKey(db, requireVessel(db, vessel), id);
    if (revoked !== null) {
      throw new DomainError('state-conflict', `The key "${name}" was revoked already, at ${revoked.at}`, { key: id });
    }
    const { at, by } = deedOf(parts);
    markKeyRevoked(db, id, at, by);
    const details = { key: id, name };
    appendAudit(db, { at, by, verb: 'revoke-key', subject: `vessel/${vessel}`, why: reason, details });
  }).immediate();
}

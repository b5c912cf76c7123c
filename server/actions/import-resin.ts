import { parseResin } from '../../models/cure/parse-resin.ts';
import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { findResin, insertResin } from '../store/resins.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Brings in a resin document. A set is never changed: other figures are another set, with a code of their own. */
export function importResin(parts: ActionParts, document: unknown): string {
  const resin = parseResin(document);
  const { db } = parts;
  db.transaction(() => {
    if (findResin(db, resin.code) !== undefined) {
      throw new DomainError('already-recorded', `There is a resin set "${resin.code}" already; it is never changed`, {
        resin: resin.code,
      });
    }
    const { at, by } = deedOf(parts);
    const sha256 = insertResin(db, resin, at, by);
    appendAudit(db, { at, by, verb: 'import-resin', subject: `resin/${resin.code}`, details: { document: sha256 } });
  }).immediate();
  return resin.code;
}

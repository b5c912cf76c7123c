import { appendAudit } from '../store/audit.ts';
import { acknowledgeWarning, requireWarning } from '../store/warnings.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Somebody has seen a warning and says so by name; it goes on while what it warns of lasts. */
export function acknowledge(parts: ActionParts, id: number, text: string | undefined): void {
  const { db } = parts;
  db.transaction(() => {
    const { at, by } = deedOf(parts);
    acknowledgeWarning(db, id, text ?? null, at, by);
    const { run, subject, kind } = requireWarning(db, id);
    appendAudit(db, {
      at,
      by,
      verb: 'acknowledge-warning',
      subject: run === null ? `warning/${id}` : `run/${run}`,
      why: text ?? null,
      details: { warning: id, kind, about: subject },
    });
  }).immediate();
}

import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { sha256OfDocument } from '../store/canonical.ts';
import { findCycle, insertCycle, insertCycleStatus, replaceDraft } from '../store/cycles.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Brings in a cycle document as a draft, or puts it in the place of the draft of the same issue. */
export function importCycle(parts: ActionParts, document: unknown): { readonly code: string; readonly issue: string } {
  const cycle = parseCycle(document);
  const { code, issue } = cycle;
  const { db } = parts;
  db.transaction(() => {
    const { at, by } = deedOf(parts);
    const known = findCycle(db, code, issue);
    const sha256 = sha256OfDocument(cycle);
    if (known?.sha256 === sha256) {
      throw new DomainError('already-recorded', `Cycle ${code} issue ${issue} is here already, word for word`, {
        cycle: code,
        issue,
      });
    }
    if (known === undefined) {
      insertCycleStatus(db, insertCycle(db, cycle, at, by), 'draft', null, at, by);
    } else if (known.status === 'draft') {
      replaceDraft(db, known.id, cycle, at, by);
    } else {
      throw new DomainError(
        'state-conflict',
        `Cycle ${code} issue ${issue} is ${known.status} and frozen; a change needs another issue`,
        { cycle: code, issue, status: known.status },
      );
    }
    appendAudit(db, { at, by, verb: 'import-cycle', subject: `cycle/${code}/${issue}`, details: { document: sha256 } });
  }).immediate();
  return { code, issue };
}

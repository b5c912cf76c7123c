import { DomainError } from '../../models/errors.ts';
import type { AddPartWorkRequest } from '../contract/layups.ts';
import { appendAudit } from '../store/audit.ts';
import { insertPartWork } from '../store/part-works.ts';
import { requirePart } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records what was done to a part after its cure. */
export function addPartWork(parts: ActionParts, serial: string, request: AddPartWorkRequest): void {
  const { work, text, at: doneAt, replaces = null, reason = null } = request;
  if (Date.parse(doneAt) > parts.clock()) {
    throw new DomainError('invalid-request', 'The work lies in the future', { at: doneAt });
  }
  if ((replaces === null) !== (reason === null)) {
    throw new DomainError('invalid-request', 'Work that replaces what was written down says why; other work does not', {
      replaces,
    });
  }
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    insertPartWork(db, { partId: requirePart(db, serial), replaces, work, text, doneAt, reason, ...deed });
    appendAudit(db, {
      ...deed,
      verb: 'add-part-work',
      subject: `part/${serial}`,
      why: reason,
      details: { work, text, doneAt, replaces },
    });
  }).immediate();
}

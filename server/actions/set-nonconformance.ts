import { DomainError } from '../../models/errors.ts';
import type { Nonconformance, SetNonconformanceRequest } from '../contract/results.ts';
import { appendAudit } from '../store/audit.ts';
import { insertNonconformance, readNonconformances } from '../store/nonconformances.ts';
import { requirePart } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records what does not conform of a part, and what a named authority decided on it. It decides nothing itself. */
export function setNonconformance(parts: ActionParts, serial: string, request: SetNonconformanceRequest): void {
  const { number, text, reason = null } = request;
  const decision = (request.decision ?? null) as Nonconformance['decision'];
  if (decision !== null && Date.parse(decision.at) > parts.clock()) {
    throw new DomainError('invalid-request', 'The decision lies in the future', { at: decision.at });
  }
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    const partId = requirePart(db, serial);
    if (reason === null && readNonconformances(db, partId).some((known) => known.number === number)) {
      throw new DomainError('state-conflict', `${number} of ${serial} is on record; say why it is written again`, {
        part: serial,
        number,
      });
    }
    insertNonconformance(db, partId, { number, text, decision, reason, deed });
    appendAudit(db, {
      ...deed,
      verb: 'set-nonconformance',
      subject: `part/${serial}`,
      why: reason ?? decision?.because ?? null,
      details: {
        number,
        text,
        decision: decision?.word ?? null,
        authority: decision?.authority ?? null,
        conditions: decision?.conditions ?? null,
        decidedAt: decision?.at ?? null,
      },
    });
  }).immediate();
}

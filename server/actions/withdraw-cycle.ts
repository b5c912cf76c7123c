import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { insertCycleStatus, requireCycle } from '../store/cycles.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Takes an issue out of use for new loads. What was judged by it stays. */
export function withdrawCycle(parts: ActionParts, code: string, issue: string, reason: string): void {
  const { db } = parts;
  db.transaction(() => {
    const cycle = requireCycle(db, code, issue);
    if (cycle.status === 'withdrawn') {
      throw new DomainError('state-conflict', `Cycle ${code} issue ${issue} is withdrawn already`, {
        cycle: code,
        issue,
      });
    }
    const { at, by } = deedOf(parts);
    insertCycleStatus(db, cycle.id, 'withdrawn', reason, at, by);
    appendAudit(db, { at, by, verb: 'withdraw-cycle', subject: `cycle/${code}/${issue}`, why: reason });
  }).immediate();
}

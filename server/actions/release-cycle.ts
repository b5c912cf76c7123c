import { wordsOfStanding } from '../../models/cure/standing.ts';
import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { insertCycleStatus, readCycleDocument, requireCycle } from '../store/cycles.ts';
import { findResin } from '../store/resins.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { mayBeLimit } from './resin-of-workshop.ts';

/** Releases an issue: from here on its document is frozen. */
export function releaseCycle(parts: ActionParts, code: string, issue: string, reason: string): void {
  const { db } = parts;
  db.transaction(() => {
    const cycle = requireCycle(db, code, issue);
    if (cycle.status !== 'draft') {
      throw new DomainError('state-conflict', `Cycle ${code} issue ${issue} is ${cycle.status}, not a draft`, {
        cycle: code,
        issue,
        status: cycle.status,
      });
    }
    requireUsableResin(parts, readCycleDocument(db, cycle).cure?.resin);
    const { at, by } = deedOf(parts);
    insertCycleStatus(db, cycle.id, 'released', reason, at, by);
    appendAudit(db, {
      at,
      by,
      verb: 'release-cycle',
      subject: `cycle/${code}/${issue}`,
      why: reason,
      details: { document: cycle.sha256 },
    });
  }).immediate();
}

/** A set recalled from memory, or invented, is for tests and trials, never a limit in a real workshop. */
function requireUsableResin({ db }: ActionParts, code: string | undefined): void {
  if (code === undefined) return;
  const resin = findResin(db, code);
  if (resin === undefined) {
    throw new DomainError('not-found', `The cycle estimates with resin set "${code}", which is not here`, {
      resin: code,
    });
  }
  if (mayBeLimit(db, resin.status)) return;
  throw new DomainError(
    'state-conflict',
    `Resin set "${code}" is ${wordsOfStanding(resin.status)}; name a published or fitted set in the cycle's cure.resin`,
    { resin: code, status: resin.status },
  );
}

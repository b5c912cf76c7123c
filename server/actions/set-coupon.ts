import { DomainError } from '../../models/errors.ts';
import type { SetCouponRequest } from '../contract/layups.ts';
import { appendAudit } from '../store/audit.ts';
import { insertCoupon, isCouponKnown } from '../store/coupons.ts';
import { readRunsOfPart, requirePart } from '../store/parts.ts';
import { requireRun } from '../store/runs.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Ties a witness coupon to the part it was cured beside. */
export function setCoupon(parts: ActionParts, serial: string, request: SetCouponRequest): void {
  const { code, position, reason = null } = request;
  const run = request.run ?? null;
  const { db } = parts;
  db.transaction(() => {
    const partId = requirePart(db, serial);
    if (isCouponKnown(db, code) && reason === null) {
      throw new DomainError('state-conflict', `Coupon ${code} is on record already; say why it is written again`, {
        coupon: code,
      });
    }
    if (run !== null) {
      requireRun(db, run);
      if (!readRunsOfPart(db, partId).includes(run)) {
        throw new DomainError('part-unknown', `Part ${serial} was not in the load of run ${run}`, {
          part: serial,
          run,
        });
      }
    }
    const deed = deedOf(parts);
    insertCoupon(db, partId, { code, run, position: position || null, reason, deed });
    appendAudit(db, {
      ...deed,
      verb: 'set-coupon',
      subject: `part/${serial}`,
      why: reason,
      details: { coupon: code, run, position: position || null },
    });
  }).immediate();
}

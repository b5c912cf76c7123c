import { DomainError } from '../../models/errors.ts';
import type { SetWhereaboutsRequest, Whereabouts } from '../contract/trace.ts';
import { appendAudit } from '../store/audit.ts';
import { requirePart } from '../store/parts.ts';
import { insertWhereabouts } from '../store/whereabouts.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records where a part is: in the shop, or with a customer since a day. */
export function setWhereabouts(parts: ActionParts, serial: string, request: SetWhereaboutsRequest): void {
  const { db, clock } = parts;
  const { place, since } = request;
  const customer = request.customer || null;
  if ((place === 'shipped') !== (customer !== null)) {
    const message = place === 'shipped' ? 'To whom was it shipped?' : 'A part in the shop is with no customer';
    throw new DomainError('invalid-request', message, { place, customer });
  }
  db.transaction(() => {
    const today = new Intl.DateTimeFormat('en-CA', { timeZone: zoneOfWorkshop(db) }).format(clock());
    if (since > today) throw new DomainError('invalid-request', `${since} lies in the future`, { since, today });
    const partId = requirePart(db, serial);
    const deed = deedOf(parts);
    const where: Whereabouts = { place, customer, since, text: request.text || null, deed };
    insertWhereabouts(db, partId, where);
    appendAudit(db, {
      ...deed,
      verb: 'set-whereabouts',
      subject: `part/${serial}`,
      why: where.text,
      details: { place, customer, since },
    });
  }).immediate();
}

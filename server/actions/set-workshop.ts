import { DomainError } from '../../models/errors.ts';
import type { SetWorkshopRequest } from '../contract/workshop.ts';
import { appendAudit } from '../store/audit.ts';
import { findWorkshop, writeWorkshop } from '../store/workshop.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Names the workshop, its zone and its units. `practice` is taken the first time only. */
export function setWorkshop(parts: ActionParts, request: SetWorkshopRequest, practice: string | null = null): void {
  requireZone(request.zone);
  const { db } = parts;
  db.transaction(() => {
    if (practice !== null && findWorkshop(db) !== null) {
      throw new DomainError('state-conflict', 'A workshop that is in use does not become a practice workshop');
    }
    writeWorkshop(db, request, practice);
    appendAudit(db, {
      ...deedOf(parts),
      verb: 'set-workshop',
      subject: 'workshop',
      details: { name: request.name, zone: request.zone, ...request.units },
    });
  }).immediate();
}

function requireZone(zone: string): void {
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
  } catch (cause) {
    throw new DomainError('zone-unknown', `"${zone}" is not an IANA time zone`, { zone }, { cause });
  }
}

import type { AddVesselRequest } from '../contract/workshop.ts';
import { appendAudit } from '../store/audit.ts';
import { insertVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

export function addVessel(parts: ActionParts, request: AddVesselRequest): void {
  const { db } = parts;
  db.transaction(() => {
    insertVessel(db, request);
    appendAudit(db, {
      ...deedOf(parts),
      verb: 'add-vessel',
      subject: `vessel/${request.name}`,
      details: { kind: request.kind },
    });
  }).immediate();
}

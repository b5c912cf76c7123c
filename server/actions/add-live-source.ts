import type { SetSourceRequest } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import { insertLiveSource, keepPassword, requireLiveSource } from '../store/live-sources.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { liveSourceDocument } from './live-source-document.ts';

/** Adds a source of readings to a vessel; it is listened to from then on. */
export function addLiveSource(parts: ActionParts, vessel: string, request: SetSourceRequest): number {
  const { db } = parts;
  const { password = '' } = request;
  return db
    .transaction(() => {
      const deed = deedOf(parts);
      const document = liveSourceDocument(db, request.document, password !== '');
      const id = insertLiveSource(db, requireVessel(db, vessel), { document, isResting: false, ...deed });
      keepPassword(db, id, password);
      appendAudit(db, {
        ...deed,
        verb: 'add-source',
        subject: `live-source/${document.name}`,
        details: { vessel, document: requireLiveSource(db, id).settings.sha256 },
      });
      return id;
    })
    .immediate();
}

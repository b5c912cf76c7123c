import type { RestSourceRequest, SetSourceRequest } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import { insertSettings, keepPassword, requireLiveSource } from '../store/live-sources.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { liveSourceDocument, passwordFor } from './live-source-document.ts';

/** Sets how a source is read from now on. A password that is not sent stays as long as it goes to the same broker; an empty one is taken away. */
export function setLiveSource(parts: ActionParts, id: number, request: SetSourceRequest): void {
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    const source = requireLiveSource(db, id);
    const { name, settings } = source;
    const written = liveSourceDocument(db, request.document, false);
    const password = request.password ?? passwordFor(db, source, written) ?? '';
    const document = liveSourceDocument(db, request.document, password !== '');
    insertSettings(db, id, { document, isResting: settings.isResting, ...deed });
    keepPassword(db, id, password);
    const { sha256 } = requireLiveSource(db, id).settings;
    appendAudit(db, {
      ...deed,
      verb: 'set-source',
      subject: `live-source/${name}`,
      details: { document: sha256, before: settings.sha256 },
    });
  }).immediate();
}

/** Lets a source rest, or wakes it. */
export function restLiveSource(parts: ActionParts, id: number, { resting, reason }: RestSourceRequest): void {
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    const { name, settings } = requireLiveSource(db, id);
    if (settings.isResting === resting) return;
    insertSettings(db, id, { document: settings.document, isResting: resting, ...deed });
    const verb = resting ? 'rest-source' : 'wake-source';
    appendAudit(db, { ...deed, verb, subject: `live-source/${name}`, why: reason });
  }).immediate();
}

import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { appendAudit } from '../store/audit.ts';
import * as recorders from '../store/recorders.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Makes a layout the one a recorder's files are read by. It keeps no parts: those belong to one load. */
export function keepLayout(parts: ActionParts, recorder: string, document: Layout): void {
  const { db } = parts;
  const layout = withoutParts(parseLayout(document));
  db.transaction(() => {
    const { at, by } = deedOf(parts);
    const { id } = recorders.requireRecorder(db, recorder);
    const sha256 = recorders.keepLayout(db, id, layout, at, by);
    if (sha256 === null) return;
    appendAudit(db, { at, by, verb: 'keep-layout', subject: `recorder/${recorder}`, details: { layout: sha256 } });
  }).immediate();
}

function withoutParts(layout: Layout): Layout {
  return { ...layout, channels: layout.channels.map(({ parts: _parts, ...channel }) => channel) };
}

import type { Layout } from '../../models/log/layout.ts';
import { appendAudit } from '../store/audit.ts';
import { insertRecorder } from '../store/recorders.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { keepLayout } from './keep-layout.ts';

export interface NewRecorder {
  readonly name: string;
  readonly vessel?: string | null | undefined;
  readonly layout?: Layout | undefined;
}

export function addRecorder(parts: ActionParts, { name, vessel = null, layout }: NewRecorder): void {
  const { db } = parts;
  db.transaction(() => {
    insertRecorder(db, name, vessel === null ? null : requireVessel(db, vessel));
    appendAudit(db, { ...deedOf(parts), verb: 'add-recorder', subject: `recorder/${name}`, details: { vessel } });
    if (layout !== undefined) keepLayout(parts, name, layout);
  }).immediate();
}

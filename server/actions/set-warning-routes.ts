import type { SetWarningRoutesRequest } from '../contract/warnings.ts';
import { appendAudit } from '../store/audit.ts';
import { insertWarningRoutes, keepMailPassword } from '../store/warning-routes.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Says where warnings are told besides the screen. */
export function setWarningRoutes(parts: ActionParts, { webhook, mail, password }: SetWarningRoutesRequest): void {
  const { db } = parts;
  db.transaction(() => {
    const { at, by } = deedOf(parts);
    insertWarningRoutes(db, { webhook, mail }, at, by);
    if (password !== undefined) keepMailPassword(db, password);
    appendAudit(db, {
      at,
      by,
      verb: 'set-warning-routes',
      subject: 'workshop',
      details: { webhook: webhook?.url ?? null, mail: mail?.to.join(', ') ?? null },
    });
  }).immediate();
}

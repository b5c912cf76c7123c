import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { markImportDiscarded, requireImport } from '../store/imports.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Sets a file aside that waits for someone; its bytes stay. */
export function discardImport(parts: ActionParts, id: number, reason: string): void {
  const { db } = parts;
  db.transaction(() => {
    const row = requireImport(db, id);
    if (row.state !== 'waiting') {
      throw new DomainError('state-conflict', `Import ${id} is ${row.state} already`, { import: id, state: row.state });
    }
    markImportDiscarded(db, id);
    appendAudit(db, {
      ...deedOf(parts),
      verb: 'discard-import',
      subject: `import/${id}`,
      why: reason,
      details: { name: row.name, sha256: row.sha256 },
    });
  }).immediate();
}

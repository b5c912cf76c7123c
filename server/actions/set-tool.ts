import { DomainError } from '../../models/errors.ts';
import type { SetToolRequest } from '../contract/tool-record.ts';
import { appendAudit } from '../store/audit.ts';
import { findToolRecord, insertToolRecord, keepTool } from '../store/tools.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records what a tool is; one that has a record already gets another, and why. */
export function setTool(parts: ActionParts, code: string, request: SetToolRequest): void {
  const { title, drawing, thicknessMm = null, material = null, reason = null } = request;
  const { db } = parts;
  db.transaction(() => {
    if (findToolRecord(db, code) !== null && reason === null) {
      throw new DomainError('state-conflict', `Tool ${code} has a record already; say why it is written again`, {
        tool: code,
      });
    }
    const deed = deedOf(parts);
    const record = { title: title || null, drawing: drawing || null, thicknessMm, material, reason, deed };
    insertToolRecord(db, keepTool(db, code), record);
    appendAudit(db, {
      ...deed,
      verb: 'set-tool',
      subject: `tool/${code}`,
      why: reason,
      details: {
        title: record.title,
        drawing: record.drawing,
        thicknessMm,
        ...material,
        material: material?.name ?? null,
      },
    });
  }).immediate();
}

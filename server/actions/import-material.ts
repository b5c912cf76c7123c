import { DomainError } from '../../models/errors.ts';
import { parseMaterial } from '../../models/material/parse-material.ts';
import { appendAudit } from '../store/audit.ts';
import { findMaterial, insertMaterial } from '../store/materials.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Brings in an issue of a material document. An issue is never changed: other rules are another issue. */
export function importMaterial(
  parts: ActionParts,
  document: unknown,
): { readonly code: string; readonly issue: string } {
  const material = parseMaterial(document);
  const { code, issue } = material;
  const { db } = parts;
  db.transaction(() => {
    if (findMaterial(db, code, issue) !== undefined) {
      throw new DomainError(
        'already-recorded',
        `Material ${code} issue ${issue} is here already; it is never changed`,
        {
          material: code,
          issue,
        },
      );
    }
    const { at, by } = deedOf(parts);
    const sha256 = insertMaterial(db, material, at, by);
    appendAudit(db, {
      at,
      by,
      verb: 'import-material',
      subject: `material/${code}/${issue}`,
      details: { document: sha256 },
    });
  }).immediate();
  return { code, issue };
}

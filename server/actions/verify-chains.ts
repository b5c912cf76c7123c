import type { AuditVerification } from '../contract/audit.ts';
import { findBrokenAuditLine } from '../store/audit.ts';
import type { Db } from '../store/database.ts';
import { findBrokenDocument } from '../store/documents.ts';
import { findBrokenEvaluation } from '../store/evaluations.ts';
import { findBrokenFile } from '../store/files.ts';
import { findBrokenSource } from '../store/sources.ts';

/** Recomputes every hash there is: the audit trail, readings, files, documents and evaluations. */
export function verifyChains(db: Db): AuditVerification {
  const trail = findBrokenAuditLine(db);
  const readings = findBrokenSource(db);
  const file = findBrokenFile(db);
  const document = findBrokenDocument(db);
  const evaluation = findBrokenEvaluation(db);
  const broken = [
    trail.firstBroken === null ? null : `audit line ${trail.firstBroken}`,
    readings.firstBroken === null ? null : `readings of ${readings.firstBroken}`,
    file === null ? null : `file ${file}`,
    document === null ? null : `document ${document}`,
    evaluation === null ? null : `evaluation ${evaluation}`,
  ].find((place) => place !== null);
  return {
    holds: broken === undefined,
    lines: trail.lines,
    sources: readings.sources,
    firstBroken: broken ?? null,
  };
}

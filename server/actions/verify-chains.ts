import type { AuditVerification } from '../contract/audit.ts';
import { findBrokenAuditLine } from '../store/audit.ts';
import type { Db } from '../store/database.ts';
import { findBrokenDocument } from '../store/documents.ts';
import { findBrokenEvaluation } from '../store/evaluations.ts';
import { findBrokenFile } from '../store/files.ts';
import { findBrokenLiveChain } from '../store/live-verify.ts';
import { countSources, findBrokenSource } from '../store/sources.ts';

/** Recomputes every hash there is: the audit trail, readings, files, documents and evaluations. */
export function verifyChains(db: Db): AuditVerification {
  const trail = findBrokenAuditLine(db);
  const firstBroken =
    (trail.firstBroken === null ? null : `audit line ${trail.firstBroken}`) ??
    broken('readings of', () => findBrokenSource(db)) ??
    broken('scans of', () => findBrokenLiveChain(db)) ??
    broken('file', () => findBrokenFile(db)) ??
    broken('document', () => findBrokenDocument(db)) ??
    broken('evaluation', () => findBrokenEvaluation(db));
  return { holds: firstBroken === null, lines: trail.lines, sources: countSources(db), firstBroken };
}

function broken(kind: string, find: () => string | number | null): string | null {
  try {
    const first = find();
    return first === null ? null : `${kind} ${first}`;
  } catch (error) {
    // What cannot even be unpacked does not hold either; the reason is all there is to say.
    return `${kind} that cannot be read: ${error instanceof Error ? error.message : String(error)}`;
  }
}

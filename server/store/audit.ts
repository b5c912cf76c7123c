import type { Audit, AuditLine } from '../contract/audit.ts';
import { canonicalJson, sha256Of } from './canonical.ts';
import type { Db } from './database.ts';

export interface AuditEntry {
  readonly at: string;
  readonly by: string;
  readonly verb: string;
  readonly subject: string;
  readonly why?: string | null;
  /** Figures and names that go with it, hashes of what was written above all. */
  readonly details?: Readonly<Record<string, string | number | boolean | null>>;
}

/** Adds one line to the trail; its hash covers itself and the hash of the line before. */
export function appendAudit(db: Db, { at, by, verb, subject, why = null, details = {} }: AuditEntry): void {
  const last = db
    .prepare<[], { n: number; sha256: string }>('SELECT n, sha256 FROM audit ORDER BY n DESC LIMIT 1')
    .get();
  const line = {
    n: (last?.n ?? 0) + 1,
    at,
    by,
    verb,
    subject,
    why,
    details: canonicalJson(details),
    previous_sha256: last?.sha256 ?? BEFORE_THE_FIRST,
  };
  db.prepare(
    `INSERT INTO audit (n, at, by, verb, subject, why, details, previous_sha256, sha256)
     VALUES (@n, @at, @by, @verb, @subject, @why, @details, @previous_sha256, @sha256)`,
  ).run({ ...line, sha256: hashOfLine(line) });
}

/** The trail, latest first. `subject` also takes what lies below it: `cycle/SR-180` finds `cycle/SR-180/B`. */
export function readAudit(
  db: Db,
  { before, subject, limit }: { before?: number | undefined; subject?: string | undefined; limit: number },
): Audit {
  const lines = db
    .prepare<object, AuditLine>(
      `SELECT n, at, by, verb, subject, why, sha256 FROM audit
       WHERE (@before IS NULL OR n < @before)
         AND (@subject IS NULL OR subject = @subject OR substr(subject, 1, length(@subject) + 1) = @subject || '/')
       ORDER BY n DESC LIMIT @limit`,
    )
    .all({ before: before ?? null, subject: subject ?? null, limit });
  return { lines, next: lines.length === limit ? (lines.at(-1)?.n ?? null) : null };
}

/** The first line whose hash does not follow from it and the line before; null where the whole chain holds. */
export function findBrokenAuditLine(db: Db): { lines: number; firstBroken: number | null } {
  let previous = BEFORE_THE_FIRST;
  let lines = 0;
  for (const { sha256, ...line } of db
    .prepare<[], HashedLine & { sha256: string }>(
      'SELECT n, at, by, verb, subject, why, details, previous_sha256, sha256 FROM audit ORDER BY n',
    )
    .iterate()) {
    lines += 1;
    if (line.n !== lines || line.previous_sha256 !== previous || hashOfLine(line) !== sha256) {
      return { lines, firstBroken: line.n };
    }
    previous = sha256;
  }
  return { lines, firstBroken: null };
}

const BEFORE_THE_FIRST = '0'.repeat(64);

interface HashedLine {
  readonly n: number;
  readonly at: string;
  readonly by: string;
  readonly verb: string;
  readonly subject: string;
  readonly why: string | null;
  readonly details: string;
  readonly previous_sha256: string;
}

function hashOfLine(line: HashedLine): string {
  return sha256Of(canonicalJson(line));
}

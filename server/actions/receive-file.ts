import { DomainError, type ErrorCode } from '../../models/errors.ts';
import type { ImportLine } from '../contract/imports.ts';
import { appendAudit } from '../store/audit.ts';
import { keepFile } from '../store/files.ts';
import { findWaitingImport, insertImport, type Refusal } from '../store/imports.ts';
import { requireRecorder } from '../store/recorders.ts';
import { findRunOfFile } from '../store/runs.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import type { IncomingFile } from './incoming-file.ts';

export interface Reception {
  readonly file: IncomingFile;
  readonly origin: ImportLine['origin'];
  readonly recorder?: string | null | undefined;
  /** Why it could not become a run by itself. */
  readonly refusal?: DomainError | null;
}

/** Keeps a file that waits for someone. The same bytes are kept once: a file that waits already is found again. */
export function receiveFile(parts: ActionParts, { file, origin, recorder = null, refusal = null }: Reception): number {
  const { db } = parts;
  return db
    .transaction(() => {
      refuseRecorded(parts, file);
      const waiting = findWaitingImport(db, file.sha256);
      if (waiting !== undefined) return waiting.id;
      const deed = deedOf(parts);
      const isLog = refusal === null || !NO_LOG_AT_ALL.has(refusal.code);
      const id = insertImport(db, {
        sha256: file.sha256,
        bytes: file.bytes,
        fileId: isLog ? keepFile(db, file) : null,
        name: file.name,
        origin,
        recorderId: recorder === null ? null : requireRecorder(db, recorder).id,
        run: null,
        refusal: refusal === null ? null : refusalOf(refusal),
        ...deed,
      });
      appendAudit(db, {
        ...deed,
        verb: 'receive-file',
        subject: `import/${id}`,
        why: refusal?.message ?? null,
        details: { name: file.name, sha256: file.sha256, origin, recorder },
      });
      return id;
    })
    .immediate();
}

/** Refuses a file that is part of a run already, naming the run. */
export function refuseRecorded({ db }: Pick<ActionParts, 'db'>, { name, sha256 }: IncomingFile): void {
  const run = findRunOfFile(db, sha256);
  if (run === null) return;
  throw new DomainError('already-recorded', `${name} is recorded already, as run ${run}`, { file: name, run, sha256 });
}

/** What no layout could ever read: the refusal is listed, the bytes are not kept. */
const NO_LOG_AT_ALL: ReadonlySet<ErrorCode> = new Set<ErrorCode>([
  'log-empty',
  'log-not-text',
  'log-line-too-long',
  'too-large',
  'file-unreadable',
]);

function refusalOf({ code, message, facts }: DomainError): Refusal {
  return { code, message, facts };
}

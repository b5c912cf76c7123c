import { DomainError } from '../../models/errors.ts';
import { pictureType } from '../files/picture-type.ts';
import { appendAudit } from '../store/audit.ts';
import { keepFile } from '../store/files.ts';
import { findPaperOf, insertPaper, type PaperOwner } from '../store/papers.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import type { IncomingFile } from './incoming-file.ts';

export interface KeptPaper {
  readonly owner: PaperOwner;
  /** `part/SR-0417`, `run/212`. */
  readonly subject: string;
  readonly file: IncomingFile;
  readonly shows: string | null;
}

/** Keeps a photograph or document of a part or run by its hash. The same bytes are kept once for each. */
export function keepPaper(parts: ActionParts, { owner, subject, file, shows }: KeptPaper): void {
  if (file.bytes === 0) throw new DomainError('file-unreadable', `${file.name} holds nothing`, { file: file.name });
  const { db } = parts;
  const [head = new Uint8Array()] = file.chunks();
  const picture = pictureType(head);
  db.transaction(() => {
    const known = findPaperOf(db, owner, file.sha256);
    if (known !== undefined) {
      throw new DomainError('already-recorded', `${file.name} is kept already, as ${known.name}`, {
        file: file.name,
        sha256: file.sha256,
      });
    }
    const deed = deedOf(parts);
    insertPaper(db, { owner, fileId: keepFile(db, file), name: file.name, picture, shows, ...deed });
    appendAudit(db, {
      ...deed,
      verb: 'keep-paper',
      subject,
      why: shows,
      details: { name: file.name, bytes: file.bytes, sha256: file.sha256 },
    });
  }).immediate();
}

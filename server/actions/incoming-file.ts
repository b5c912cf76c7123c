import { DomainError } from '../../models/errors.ts';
import type { Db } from '../store/database.ts';
import { fileChunks } from '../store/files.ts';
import type { ImportRow } from '../store/imports.ts';

/** A file as it came: its bytes can be gone through more than once. */
export interface IncomingFile {
  readonly name: string;
  readonly sha256: string;
  readonly bytes: number;
  readonly chunks: () => Iterable<Uint8Array>;
}

/** The file of an import that waits. */
export function fileOfImport(db: Db, row: ImportRow): IncomingFile {
  const { name, sha256, bytes, fileId } = row;
  if (fileId === null) {
    throw new DomainError('state-conflict', `${name}: the bytes of this file were not kept, as they are no log`, {
      import: row.id,
      file: name,
    });
  }
  return { name, sha256, bytes, chunks: () => fileChunks(db, fileId) };
}

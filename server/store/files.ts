import { createHash } from 'node:crypto';
import { deflateRawSync, inflateRawSync } from 'node:zlib';
import { DomainError } from '../../models/errors.ts';
import type { Db } from './database.ts';

export interface FileRow {
  readonly id: number;
  readonly sha256: string;
  readonly bytes: number;
}

export function findFile(db: Db, sha256: string): FileRow | undefined {
  return db.prepare<[string], FileRow>('SELECT id, sha256, bytes FROM files WHERE sha256 = ?').get(sha256);
}

/** Bytes that came in, not kept yet. */
export interface NewFile {
  readonly sha256: string;
  readonly bytes: number;
  readonly chunks: () => Iterable<Uint8Array>;
}

/**
 * Keeps a file's bytes under their hash, chunk by chunk; a file that is kept already is found again.
 *
 * Refuses bytes that do not have the hash they came with: somebody was still writing the file.
 */
export function keepFile(db: Db, { sha256, bytes, chunks }: NewFile): number {
  const known = findFile(db, sha256);
  if (known !== undefined) return known.id;
  const id = Number(db.prepare('INSERT INTO files (sha256, bytes) VALUES (?, ?)').run(sha256, bytes).lastInsertRowid);
  const insert = db.prepare('INSERT INTO file_chunks (file_id, n, bytes, packed) VALUES (?, ?, ?, ?)');
  const hash = createHash('sha256');
  let n = 0;
  for (const chunk of inPieces(chunks())) {
    hash.update(chunk);
    insert.run(id, n, chunk.length, deflateRawSync(chunk));
    n += 1;
  }
  if (hash.digest('hex') !== sha256) {
    throw new DomainError('file-unreadable', 'The file changed while it was being read; bring it in again', { sha256 });
  }
  return id;
}

/** The bytes as they came, chunk by chunk. Can be gone through again. */
export function fileChunks(db: Db, fileId: number): Iterable<Uint8Array> {
  return {
    *[Symbol.iterator]() {
      const one = db
        .prepare<[number, number], Buffer>('SELECT packed FROM file_chunks WHERE file_id = ? AND n = ?')
        .pluck();
      for (let n = 0; ; n += 1) {
        const packed = one.get(fileId, n);
        if (packed === undefined) return;
        yield inflateRawSync(packed);
      }
    },
  };
}

/** The first kept file whose bytes no longer have its hash. */
export function findBrokenFile(db: Db): string | null {
  for (const file of db.prepare<[], FileRow>('SELECT id, sha256, bytes FROM files').all()) {
    const hash = createHash('sha256');
    for (const chunk of fileChunks(db, file.id)) hash.update(chunk);
    if (hash.digest('hex') !== file.sha256) return file.sha256;
  }
  return null;
}

/** Long enough for the packing to find what repeats, short enough to hold. */
const PIECE_BYTES = 1 << 20;

function* inPieces(chunks: Iterable<Uint8Array>): Generator<Uint8Array> {
  const piece = new Uint8Array(PIECE_BYTES);
  let filled = 0;
  for (const chunk of chunks) {
    for (let at = 0; at < chunk.length; ) {
      const taken = Math.min(chunk.length - at, PIECE_BYTES - filled);
      piece.set(chunk.subarray(at, at + taken), filled);
      at += taken;
      filled += taken;
      if (filled < PIECE_BYTES) continue;
      yield piece;
      filled = 0;
    }
  }
  if (filled > 0) yield piece.subarray(0, filled);
}

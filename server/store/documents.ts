import { DomainError } from '../../models/errors.ts';
import { sha256OfDocument } from './canonical.ts';
import type { Db } from './database.ts';

/** Keeps a document under the hash of its canonical form; keeping it again changes nothing. */
export function keepDocument(db: Db, document: { readonly format: string }): string {
  const sha256 = sha256OfDocument(document);
  const known = db.prepare('SELECT 1 FROM documents WHERE sha256 = ?').get(sha256) !== undefined;
  if (!known) {
    db.prepare('INSERT INTO documents (sha256, format, text) VALUES (?, ?, ?)').run(
      sha256,
      document.format,
      JSON.stringify(document),
    );
  }
  return sha256;
}

/** A document that is referred to; it was parsed before it was kept. */
export function readDocument<T>(db: Db, sha256: string): T {
  const text = db.prepare<[string], string>('SELECT text FROM documents WHERE sha256 = ?').pluck().get(sha256);
  if (text === undefined) {
    throw new DomainError('database-damaged', `The document ${sha256} is referred to and is not there`, { sha256 });
  }
  return JSON.parse(text) as T;
}

/** The first document whose text no longer has its hash. */
export function findBrokenDocument(db: Db): string | null {
  const rows = db.prepare<[], { sha256: string; text: string }>('SELECT sha256, text FROM documents').iterate();
  for (const { sha256, text } of rows) if (sha256OfDocument(JSON.parse(text)) !== sha256) return sha256;
  return null;
}

import type { Resin, ResinStatus } from '../../models/cure/resin.ts';
import { DomainError } from '../../models/errors.ts';
import type { ResinLine } from '../contract/resins.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';

export function listResins(db: Db): ResinLine[] {
  return db
    .prepare<[], ResinRow>(`${SELECT} ORDER BY code`)
    .all()
    .map((row) => lineOf(db, row));
}

export function findResin(db: Db, code: string): ResinLine | undefined {
  const row = db.prepare<[string], ResinRow>(`${SELECT} WHERE code = ?`).get(code);
  return row === undefined ? undefined : lineOf(db, row);
}

export function requireResin(db: Db, code: string): ResinLine {
  const resin = findResin(db, code);
  if (resin === undefined) throw new DomainError('not-found', `There is no resin set "${code}"`, { resin: code });
  return resin;
}

export function readResinDocument(db: Db, { sha256 }: { readonly sha256: string }): Resin {
  return readDocument<Resin>(db, sha256);
}

export function insertResin(db: Db, document: Resin, at: string, by: string): string {
  const sha256 = keepDocument(db, document);
  db.prepare('INSERT INTO resins (code, name, status, document_sha256, at, by) VALUES (?, ?, ?, ?, ?, ?)').run(
    document.code,
    document.name,
    document.source.status,
    sha256,
    at,
    by,
  );
  return sha256;
}

interface ResinRow {
  readonly code: string;
  readonly name: string;
  readonly status: ResinStatus;
  readonly sha256: string;
  readonly at: string;
  readonly by: string;
}

const SELECT = 'SELECT code, name, status, document_sha256 AS sha256, at, by FROM resins';

function lineOf(db: Db, { at, by, ...row }: ResinRow): ResinLine {
  const cycles = db
    .prepare<[string], { code: string; issue: string }>(
      'SELECT code, issue FROM cycles WHERE resin = ? ORDER BY code, issue',
    )
    .all(row.code);
  return { ...row, citation: readDocument<Resin>(db, row.sha256).source.citation, imported: { at, by }, cycles };
}

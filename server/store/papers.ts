import { DomainError } from '../../models/errors.ts';
import type { Paper } from '../contract/papers.ts';
import type { Db } from './database.ts';

/** Whose paper it is: a part's or a run's, by its row. */
export type PaperOwner = { readonly partId: number } | { readonly run: number };

export interface PaperRow extends Omit<Paper, 'deed'> {
  readonly fileId: number;
  readonly at: string;
  readonly by: string;
}

export function listPapers(db: Db, owner: PaperOwner): Paper[] {
  return db
    .prepare<object, PaperRow>(`${SELECT} WHERE part_id IS @partId AND run_id IS @run ORDER BY papers.id DESC`)
    .all(idsOf(owner))
    .map(({ fileId: _fileId, at, by, ...row }) => ({ ...row, deed: { at, by } }));
}

export function requirePaper(db: Db, id: number): PaperRow {
  const row = db.prepare<[number], PaperRow>(`${SELECT} WHERE papers.id = ?`).get(id);
  if (row === undefined) throw new DomainError('not-found', `There is no paper ${id}`, { paper: id });
  return row;
}

export function findPaperOf(db: Db, owner: PaperOwner, sha256: string): PaperRow | undefined {
  return db
    .prepare<object, PaperRow>(`${SELECT} WHERE part_id IS @partId AND run_id IS @run AND sha256 = @sha256`)
    .get({ ...idsOf(owner), sha256 });
}

export interface NewPaper extends Pick<PaperRow, 'fileId' | 'name' | 'picture' | 'shows' | 'at' | 'by'> {
  readonly owner: PaperOwner;
}

export function insertPaper(db: Db, { owner, ...paper }: NewPaper): number {
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO papers (part_id, run_id, file_id, name, picture, shows, at, by)
       VALUES (@partId, @run, @fileId, @name, @picture, @shows, @at, @by)`,
    )
    .run({ ...idsOf(owner), ...paper });
  return Number(lastInsertRowid);
}

function idsOf(owner: PaperOwner): { readonly partId: number | null; readonly run: number | null } {
  return 'run' in owner ? { partId: null, run: owner.run } : { partId: owner.partId, run: null };
}

const SELECT = `
  SELECT papers.id, name, bytes, sha256, picture, shows, file_id AS fileId, at, by
  FROM papers JOIN files ON files.id = file_id`;

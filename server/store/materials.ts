import { DomainError } from '../../models/errors.ts';
import type { Material } from '../../models/material/material.ts';
import type { MaterialLine } from '../contract/materials.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';

export interface MaterialRow extends MaterialLine {
  readonly id: number;
}

/** Issues of materials: all, or those of one code; the latest of a code first. */
export function listMaterials(db: Db, code?: string): MaterialRow[] {
  return db
    .prepare<object, SelectedRow>(`${SELECT} WHERE @code IS NULL OR code = @code ORDER BY code, id DESC`)
    .all({ code: code ?? null })
    .map(rowOf);
}

export function findMaterial(db: Db, code: string, issue: string): MaterialRow | undefined {
  const row = db.prepare<object, SelectedRow>(`${SELECT} WHERE code = @code AND issue = @issue`).get({ code, issue });
  return row === undefined ? undefined : rowOf(row);
}

export function requireMaterial(db: Db, code: string, issue: string): MaterialRow {
  const row = findMaterial(db, code, issue);
  if (row !== undefined) return row;
  throw new DomainError('not-found', `There is no material ${code} issue ${issue}`, { material: code, issue });
}

export function readMaterialDocument(db: Db, { sha256 }: { readonly sha256: string }): Material {
  return readDocument<Material>(db, sha256);
}

export function insertMaterial(db: Db, document: Material, at: string, by: string): string {
  const sha256 = keepDocument(db, document);
  db.prepare('INSERT INTO materials (code, issue, name, document_sha256, at, by) VALUES (?, ?, ?, ?, ?, ?)').run(
    document.code,
    document.issue,
    document.name,
    sha256,
    at,
    by,
  );
  return sha256;
}

type SelectedRow = Omit<MaterialRow, 'imported'> & { readonly at: string; readonly by: string };

const SELECT = 'SELECT id, code, issue, name, document_sha256 AS sha256, at, by FROM materials';

function rowOf({ at, by, ...row }: SelectedRow): MaterialRow {
  return { ...row, imported: { at, by } };
}

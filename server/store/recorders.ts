import { DomainError } from '../../models/errors.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { KeptLayout, Recorder } from '../contract/recorders.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';

export function listRecorders(db: Db): Recorder[] {
  return db
    .prepare<[], RecorderRow>(`${SELECT_RECORDERS} ORDER BY recorders.name`)
    .all()
    .map((row) => recorderOf(db, row));
}

export function findRecorder(db: Db, name: string): Recorder | undefined {
  const row = db.prepare<[string], RecorderRow>(`${SELECT_RECORDERS} WHERE recorders.name = ?`).get(name);
  return row === undefined ? undefined : recorderOf(db, row);
}

/** The row of a recorder that must be there. */
export function requireRecorder(db: Db, name: string): { readonly id: number; readonly vesselId: number | null } {
  const row = db
    .prepare<[string], { id: number; vesselId: number | null }>(
      'SELECT id, vessel_id AS vesselId FROM recorders WHERE name = ?',
    )
    .get(name);
  if (row === undefined)
    throw new DomainError('not-found', `There is no recorder called "${name}"`, { recorder: name });
  return row;
}

/** The layout a recorder's files are read by; refused where none is kept. */
export function requireKeptLayout(db: Db, name: string): Layout {
  requireRecorder(db, name);
  const layout = findRecorder(db, name)?.layout;
  if (layout) return layout.document;
  throw new DomainError('layout-not-provable', `No layout is kept for the recorder "${name}" yet`, { recorder: name });
}

export function insertRecorder(db: Db, name: string, vesselId: number | null): void {
  if (db.prepare('SELECT 1 FROM recorders WHERE name = ?').get(name) !== undefined) {
    throw new DomainError('already-recorded', `There is a recorder called "${name}" already`, { recorder: name });
  }
  db.prepare('INSERT INTO recorders (name, vessel_id) VALUES (?, ?)').run(name, vesselId);
}

/** Makes `layout` the one a recorder's files are read by. Says whether that is new. */
export function keepLayout(db: Db, recorderId: number, layout: Layout, at: string, by: string): string | null {
  const sha256 = keepDocument(db, layout);
  const current = db
    .prepare<[number], string>(
      'SELECT document_sha256 FROM recorder_layouts WHERE recorder_id = ? ORDER BY id DESC LIMIT 1',
    )
    .pluck()
    .get(recorderId);
  if (current === sha256) return null;
  db.prepare('INSERT INTO recorder_layouts (recorder_id, document_sha256, at, by) VALUES (?, ?, ?, ?)').run(
    recorderId,
    sha256,
    at,
    by,
  );
  return sha256;
}

interface RecorderRow {
  readonly id: number;
  readonly name: string;
  readonly vessel: string | null;
  readonly runs: number;
}

const SELECT_RECORDERS = `
  SELECT recorders.id, recorders.name, vessels.name AS vessel,
         (SELECT count(DISTINCT run_id) FROM run_sources WHERE recorder_id = recorders.id) AS runs
  FROM recorders LEFT JOIN vessels ON vessels.id = recorders.vessel_id`;

function recorderOf(db: Db, { id, name, vessel, runs }: RecorderRow): Recorder {
  const kept = db
    .prepare<[number], { sha256: string; at: string; by: string }>(
      'SELECT document_sha256 AS sha256, at, by FROM recorder_layouts WHERE recorder_id = ? ORDER BY id DESC',
    )
    .all(id)
    .map(
      ({ sha256, at, by }): KeptLayout => ({ sha256, kept: { at, by }, document: readDocument<Layout>(db, sha256) }),
    );
  return { name, vessel, layout: kept[0] ?? null, earlierLayouts: kept.slice(1), runs };
}

import { DomainError } from '../../models/errors.ts';
import type { SenderKey } from '../contract/live.ts';
import { sha256Of } from './canonical.ts';
import type { Db } from './database.ts';

export interface NewKey {
  readonly vesselId: number;
  readonly name: string;
  /** What the sender will send; only its hash is kept. */
  readonly key: string;
  readonly at: string;
  readonly by: string;
}

export function insertKey(db: Db, { vesselId, name, key, at, by }: NewKey): number {
  const { lastInsertRowid } = db
    .prepare('INSERT INTO sender_keys (vessel_id, name, sha256, at, by) VALUES (?, ?, ?, ?, ?)')
    .run(vesselId, name, sha256Of(key), at, by);
  return Number(lastInsertRowid);
}

export interface KnownKey {
  readonly id: number;
  readonly vesselId: number;
  readonly name: string;
  readonly isRevoked: boolean;
}

/** The key a sender sent; undefined where there is none like it. */
export function findKey(db: Db, key: string): KnownKey | undefined {
  const row = db
    .prepare<[string], { id: number; vesselId: number; name: string; revokedAt: string | null }>(
      'SELECT id, vessel_id AS vesselId, name, revoked_at AS revokedAt FROM sender_keys WHERE sha256 = ?',
    )
    .get(sha256Of(key));
  if (row === undefined) return undefined;
  const { revokedAt, ...known } = row;
  return { ...known, isRevoked: revokedAt !== null };
}

export function listKeys(db: Db, vesselId: number): SenderKey[] {
  return db.prepare<[number], KeyRow>(`${SELECT} WHERE vessel_id = ? ORDER BY id`).all(vesselId).map(keyOf);
}

export function requireKey(db: Db, vesselId: number, id: number): SenderKey {
  const row = db.prepare<[number, number], KeyRow>(`${SELECT} WHERE vessel_id = ? AND id = ?`).get(vesselId, id);
  if (row === undefined) throw new DomainError('not-found', `The vessel has no key ${id}`, { key: id });
  return keyOf(row);
}

export function markKeyRevoked(db: Db, id: number, at: string, by: string): void {
  db.prepare('UPDATE sender_keys SET revoked_at = ?, revoked_by = ? WHERE id = ?').run(at, by, id);
}

export function markKeyUsed(db: Db, id: number, at: string): void {
  db.prepare('UPDATE sender_keys SET last_used_at = ? WHERE id = ?').run(at, id);
}

const SELECT = 'SELECT id, name, at, by, revoked_at, revoked_by, last_used_at FROM sender_keys';

interface KeyRow {
  readonly id: number;
  readonly name: string;
  readonly at: string;
  readonly by: string;
  readonly revoked_at: string | null;
  readonly revoked_by: string | null;
  readonly last_used_at: string | null;
}

function keyOf({ id, name, at, by, revoked_at, revoked_by, last_used_at }: KeyRow): SenderKey {
  const revoked = revoked_at === null || revoked_by === null ? null : { at: revoked_at, by: revoked_by };
  return { id, name, made: { at, by }, revoked, lastUsed: last_used_at };
}

import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type Database from 'better-sqlite3';
import { DomainError } from '../../models/errors.ts';

export interface Migration {
  /** `0001-audit`: also the order they are applied in. */
  readonly name: string;
  readonly sql: string;
  readonly sha256: string;
}

/** The steps this program knows, in order. */
export function readMigrations(folder = new URL('../../migrations/', import.meta.url)): readonly Migration[] {
  return readdirSync(fileURLToPath(folder))
    .filter((file) => /^\d{4}-[a-z-]+\.sql$/.test(file))
    .sort()
    .map((file) => {
      const sql = readFileSync(new URL(file, folder), 'utf8');
      return { name: file.slice(0, -4), sql, sha256: createHash('sha256').update(sql).digest('hex') };
    });
}

/** Applies what is missing, each step whole or not at all, and refuses a database with a step it does not know. */
export function applyMigrations(db: Database.Database, at: string, migrations = readMigrations()): readonly string[] {
  // Looked at first without a lock: a database that is up to date is opened without a write.
  const applied = appliedNames(db);
  refuseNewer(applied, migrations);
  if (migrations.every(({ name }) => applied.has(name))) return [];
  db.exec(`CREATE TABLE IF NOT EXISTS migrations (
  name   TEXT PRIMARY KEY,
  sha256 TEXT NOT NULL CHECK (length(sha256) = 64),
  at     TEXT NOT NULL
) STRICT`);
  return migrations.filter((migration) => applyOne(db, at, migration)).map(({ name }) => name);
}

function applyOne(db: Database.Database, at: string, { name, sql, sha256 }: Migration): boolean {
  return db
    .transaction(() => {
      if (appliedNames(db).has(name)) return false;
      db.exec(sql);
      db.prepare('INSERT INTO migrations (name, sha256, at) VALUES (?, ?, ?)').run(name, sha256, at);
      return true;
    })
    .immediate();
}

function appliedNames(db: Database.Database): ReadonlySet<string> {
  const exists = db.prepare("SELECT 1 FROM sqlite_schema WHERE name = 'migrations'").get() !== undefined;
  return new Set(exists ? db.prepare<[], string>('SELECT name FROM migrations').pluck().all() : []);
}

function refuseNewer(applied: ReadonlySet<string>, migrations: readonly Migration[]): void {
  const known = new Set(migrations.map(({ name }) => name));
  const unknown = [...applied].filter((name) => !known.has(name)).sort();
  if (unknown.length === 0) return;
  throw new DomainError(
    'database-newer',
    `The database was written by a later version of the program: it has ${unknown.join(', ')}, which this one does not know`,
    { migration: unknown[0] ?? '' },
  );
}

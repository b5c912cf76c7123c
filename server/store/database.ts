import Database from 'better-sqlite3';
import { DomainError } from '../../models/errors.ts';
import { applyMigrations } from './migrations.ts';

export type Db = Database.Database;

/** Marks the file as this product's ("Dwel" in ASCII), so that another program's database is not written into. */
const APPLICATION_ID = 0x4477656c;

export interface OpenOptions {
  /** ISO instant, written beside each migration that is applied. */
  readonly at: string;
  /** Opens an existing, up-to-date file without being able to write. */
  readonly readonly?: boolean;
}

/** Opens a workshop's database, making and upgrading it as needed. Every open is durable at every commit. */
export function openDatabase(path: string, { at, readonly = false }: OpenOptions): Db {
  const db = connect(path, readonly);
  try {
    // The driver is built so that a WAL database is re-opened at NORMAL, where a power cut may lose a commit.
    if (!readonly) db.pragma('journal_mode = WAL');
    db.pragma('synchronous = FULL');
    db.pragma('foreign_keys = ON');
    db.pragma('busy_timeout = 5000');
    // 64 MB: the indexes of ten years, which the driver's own 2 MB would read from the disk over and over.
    db.pragma('cache_size = -65536');
    refuseForeignFile(db, path);
    if (!readonly) {
      db.pragma(`application_id = ${APPLICATION_ID}`);
      applyMigrations(db, at);
    }
    return db;
  } catch (error) {
    db.close();
    throw asDamage(error, path);
  }
}

/** What a thread reads of a database it opens for itself: as it stood at one moment, without being able to write. */
export function readDatabase<T>(path: string, at: string, read: (db: Db) => T): T {
  const db = openDatabase(path, { at, readonly: true });
  try {
    return db.transaction(() => read(db))();
  } finally {
    db.close();
  }
}

function connect(path: string, readonly: boolean): Db {
  try {
    return new Database(path, { readonly, fileMustExist: readonly });
  } catch (error) {
    throw new DomainError(
      'file-unreadable',
      `${path}: the database cannot be opened`,
      { file: path },
      { cause: error },
    );
  }
}

function refuseForeignFile(db: Db, path: string): void {
  const id = db.pragma('application_id', { simple: true });
  const tables = db.prepare('SELECT count(*) FROM sqlite_schema').pluck().get();
  if (id === APPLICATION_ID || (id === 0 && tables === 0)) return;
  throw new DomainError('database-damaged', `${path}: this is another program's database`, { file: path });
}

function asDamage(error: unknown, path: string): unknown {
  const code = error instanceof Database.SqliteError ? error.code : '';
  if (!code.startsWith('SQLITE_NOTADB') && !code.startsWith('SQLITE_CORRUPT')) return error;
  return new DomainError('database-damaged', `${path}: not a sound database`, { file: path }, { cause: error });
}

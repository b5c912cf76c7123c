import type { Statement } from 'better-sqlite3';
import type { Db } from './database.ts';

const statements = new WeakMap<Db, Map<string, Statement>>();

/** A statement that runs many times a second, compiled once a connection. */
export function prepared<Bind extends unknown[] | object, Row = unknown>(db: Db, sql: string) {
  let known = statements.get(db);
  if (known === undefined) {
    known = new Map();
    statements.set(db, known);
  }
  let statement = known.get(sql);
  if (statement === undefined) {
    statement = db.prepare(sql);
    known.set(sql, statement);
  }
  return statement as unknown as ReturnType<typeof db.prepare<Bind, Row>>;
}

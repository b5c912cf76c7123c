import type { WarningRoutes } from '../contract/warnings.ts';
import type { Db } from './database.ts';

/** Where warnings are told besides the screen; nowhere before anyone has said. */
export function findWarningRoutes(db: Db): WarningRoutes {
  const text = db.prepare<[], string>('SELECT routes FROM warning_routes ORDER BY id DESC LIMIT 1').pluck().get();
  return text === undefined ? { webhook: null, mail: null } : JSON.parse(text);
}

export function insertWarningRoutes(db: Db, routes: WarningRoutes, at: string, by: string): void {
  db.prepare('INSERT INTO warning_routes (routes, at, by) VALUES (?, ?, ?)').run(JSON.stringify(routes), at, by);
}

export function findMailPassword(db: Db): string | undefined {
  return db.prepare<[], string>('SELECT password FROM warning_mail_passwords').pluck().get();
}

/** Keeps what lets us in at the mail server; an empty one takes it away. */
export function keepMailPassword(db: Db, password: string): void {
  db.prepare('DELETE FROM warning_mail_passwords').run();
  if (password !== '') db.prepare('INSERT INTO warning_mail_passwords (id, password) VALUES (1, ?)').run(password);
}

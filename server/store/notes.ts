import type { Note } from '../contract/runs.ts';
import type { Db } from './database.ts';

export function insertNote(db: Db, run: number, about: string, text: string, at: string, by: string): void {
  db.prepare('INSERT INTO run_notes (run_id, about, text, at, by) VALUES (?, ?, ?, ?, ?)').run(
    run,
    about,
    text,
    at,
    by,
  );
}

export function readNotes(db: Db, run: number): Note[] {
  return db
    .prepare<[number], { about: string; text: string; at: string; by: string }>(
      'SELECT about, text, at, by FROM run_notes WHERE run_id = ? ORDER BY id',
    )
    .all(run)
    .map(({ about, text, at, by }) => ({ at: about, text, deed: { at, by } }));
}

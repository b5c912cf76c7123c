import type { AddNoteRequest } from '../contract/runs.ts';
import { appendAudit } from '../store/audit.ts';
import { insertNote } from '../store/notes.ts';
import { requireRun } from '../store/runs.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Writes in the margin of a run; `at` is the instant of the run it is about. */
export function addNote(parts: ActionParts, run: number, { text, at: about }: AddNoteRequest): void {
  const { db } = parts;
  db.transaction(() => {
    const { at, by } = deedOf(parts);
    requireRun(db, run);
    insertNote(db, run, about ?? at, text, at, by);
    appendAudit(db, { at, by, verb: 'add-note', subject: `run/${run}`, why: text });
  }).immediate();
}

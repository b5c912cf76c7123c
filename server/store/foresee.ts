import type { Db } from './database.ts';

/** What `read` would find once `write` were done. Nothing stays written. */
export function foresee<T>(db: Db, write: () => void, read: () => T): T {
  let found: { readonly value: T } | null = null;
  const undo = new Error('undone');
  try {
    db.transaction(() => {
      write();
      found = { value: read() };
      throw undo;
    }).immediate();
  } catch (error) {
    if (error !== undo) throw error;
  }
  return (found as unknown as { readonly value: T }).value;
}

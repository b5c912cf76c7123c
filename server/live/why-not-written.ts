/** Why SQLite could not write, where that may pass: in words; null for anything else, which is a fault. */
export function whyNotWritten(error: unknown): string | null {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  if (code.startsWith('SQLITE_FULL')) return 'the disk is full';
  if (code.startsWith('SQLITE_IOERR')) return 'the disk cannot be written';
  if (code.startsWith('SQLITE_BUSY')) return 'another program is writing to the database and does not let go';
  if (code.startsWith('SQLITE_READONLY')) return 'the database may only be read';
  return null;
}

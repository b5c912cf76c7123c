import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach } from 'vitest';
import { type Db, openDatabase } from '../../server/store/database.ts';

const leftovers: (() => void)[] = [];

afterEach(() => {
  for (const remove of leftovers.splice(0).reverse()) remove();
});

/** A folder of this test's own, gone when the test ends. */
export function freshFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'dwellbook-test-'));
  leftovers.push(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

/** A new workshop database in a file of its own, closed when the test ends. */
export function freshDatabase(path = join(freshFolder(), 'workshop.sqlite')): Db {
  const db = openDatabase(path, { at: '2026-03-02T08:00:00.000Z' });
  leftovers.push(() => db.close());
  return db;
}

import type { Db } from '../../server/store/database.ts';

/**
 * Makes the n-th insert into any table fail inside SQLite itself; n = 0 only counts.
 *
 * Returns how many inserts were seen since, and takes the faults away again.
 */
export function failNthInsert(db: Db, n: number): { readonly seen: () => number; readonly end: () => void } {
  let seen = 0;
  db.function('fault_point', () => {
    seen += 1;
    if (seen === n) throw new Error('injected fault');
    return 0;
  });
  const tables = db
    .prepare<[], string>("SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%'")
    .pluck()
    .all();
  for (const table of tables) {
    db.exec(`CREATE TEMP TRIGGER fault_${table} BEFORE INSERT ON main.${table} BEGIN SELECT fault_point(); END`);
  }
  return {
    seen: () => seen,
    end() {
      for (const table of tables) db.exec(`DROP TRIGGER fault_${table}`);
    },
  };
}

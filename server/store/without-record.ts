import type { WithoutRecord } from '../contract/ask.ts';
import type { Db } from './database.ts';

const MOST = 200;

/** Parts of which no run, no lay-up or no material is on record, the latest known first. */
export function readWithoutRecord(db: Db): WithoutRecord {
  const lacking = (condition: string): WithoutRecord['noRun'] => ({
    total: db.prepare<[], number>(`SELECT count(*) FROM parts WHERE ${condition}`).pluck().get() ?? 0,
    parts: db
      .prepare<[number], string>(`SELECT serial FROM parts WHERE ${condition} ORDER BY id DESC LIMIT ?`)
      .pluck()
      .all(MOST),
  });
  return {
    parts: db.prepare<[], number>('SELECT count(*) FROM parts').pluck().get() ?? 0,
    noRun: lacking(`NOT EXISTS (
      SELECT 1 FROM load_parts JOIN loads ON loads.id = load_id
      WHERE part_id = parts.id AND loads.id = (SELECT max(id) FROM loads AS later WHERE later.run_id = loads.run_id))`),
    noLayup: lacking('NOT EXISTS (SELECT 1 FROM part_layups WHERE part_id = parts.id)'),
    noMaterial: lacking('NOT EXISTS (SELECT 1 FROM part_materials_now WHERE part_id = parts.id)'),
  };
}

import type { Db } from './database.ts';
import { keepTool } from './tools.ts';

type Cells = Readonly<Record<string, string | number>>;
type Deed = { readonly at: string; readonly by: string };

/** Writes parts one after another, each with what is known of it. Part of a larger write; statements are prepared once. */
export function partWriter(db: Db, deed: Deed): (cells: Cells) => void {
  const insertPart = db.prepare('INSERT INTO parts (serial) VALUES (?)');
  const insertParticulars = db.prepare(
    `INSERT INTO part_particulars (part_id, title, drawing, drawing_issue, tool, at, by) VALUES (?, ?, ?, ?, ?, ?, ?)`,
  );
  const insertLayup = db.prepare(
    `INSERT INTO part_layups (part_id, tool_id, work_order, customer, thickness_mm, plies, at, by)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  const tools = new Map<string, number>();
  const toolId = (code: string) => {
    const id = tools.get(code) ?? keepTool(db, code);
    tools.set(code, id);
    return id;
  };
  return (cells) => {
    const of = (field: string) => cells[field] ?? null;
    const partId = insertPart.run(of('serial')).lastInsertRowid;
    const tool = cells.tool === undefined ? null : String(cells.tool);
    const id = tool === null ? null : toolId(tool);
    if (['title', 'drawing', 'drawing-issue', 'tool'].some((field) => field in cells)) {
      insertParticulars.run(partId, of('title'), of('drawing'), of('drawing-issue'), tool, deed.at, deed.by);
    }
    const layup = [of('work-order'), of('customer'), of('thickness-mm'), of('plies')];
    if (layup.some((value) => value !== null)) insertLayup.run(partId, id, ...layup, deed.at, deed.by);
  };
}

/** Writes rolls one after another, each with the line of its ledger that says it came. */
export function rollWriter(db: Db, deed: Deed): (cells: Cells) => void {
  const insertItem = db.prepare("INSERT INTO material_items (code, kind) VALUES (?, 'roll')");
  const insertEvent = db.prepare(
    `INSERT INTO material_events (item_id, kind, happened_at, batch_id, length_m, line, at, by)
     VALUES (?, 'received', ?, (SELECT id FROM batches WHERE code = ?), ?, ?, ?, ?)`,
  );
  return (cells) => {
    const {
      roll,
      batch,
      received: at,
      as = 'frozen',
      'length-m': lengthM = null,
      'out-minutes': outMinutesBefore,
    } = cells;
    const line = { kind: 'received', at, batch, as, ...(outMinutesBefore === undefined ? {} : { outMinutesBefore }) };
    const item = insertItem.run(roll).lastInsertRowid;
    insertEvent.run(item, at, batch, lengthM, JSON.stringify(line), deed.at, deed.by);
  };
}

/** Codes that are taken already, and batches that are on record. */
export function codesKnown(db: Db, kind: 'parts' | 'rolls'): ReadonlySet<string> {
  const select = kind === 'parts' ? 'SELECT serial FROM parts' : 'SELECT code FROM material_items';
  return new Set(db.prepare<[], string>(select).pluck().all());
}

export function batchesKnown(db: Db): ReadonlyMap<string, string | null> {
  return new Map(
    db
      .prepare<[], { code: string; made: string | null }>(
        `SELECT code, (SELECT made FROM batch_particulars WHERE batch_id = batches.id ORDER BY id DESC LIMIT 1) AS made
         FROM batches`,
      )
      .all()
      .map(({ code, made }) => [code, made]),
  );
}

import { DomainError } from '../../models/errors.ts';
import type { PartLine, Parts } from '../contract/parts.ts';
import type { Particulars } from '../contract/runs.ts';
import type { Db } from './database.ts';
import { isoFromMs } from './instants.ts';
import { keepTool } from './tools.ts';

/** The row of a part, made where it is new. */
export function keepPart(db: Db, serial: string): number {
  return (
    findPart(db, serial) ?? Number(db.prepare('INSERT INTO parts (serial) VALUES (?)').run(serial).lastInsertRowid)
  );
}

export function findPart(db: Db, serial: string): number | undefined {
  return db.prepare<[string], number>('SELECT id FROM parts WHERE serial = ?').pluck().get(serial);
}

/** The row of a part that must be there. */
export function requirePart(db: Db, serial: string): number {
  const id = findPart(db, serial);
  if (id === undefined) throw new DomainError('not-found', `There is no part "${serial}"`, { part: serial });
  return id;
}

export function insertParticulars(db: Db, { part, ...particulars }: Particulars, at: string, by: string): void {
  const { title = null, drawing = null, drawingIssue = null, tool = null } = particulars;
  if (tool !== null && tool !== '') keepTool(db, tool);
  db.prepare(
    `INSERT INTO part_particulars (part_id, title, drawing, drawing_issue, tool, at, by)
     VALUES (?, ?, ?, ?, ?, ?, ?)`,
  ).run(keepPart(db, part), title, drawing, drawingIssue, tool, at, by);
}

export interface ParticularsRow {
  readonly title: string | null;
  readonly drawing: string | null;
  readonly drawingIssue: string | null;
  readonly tool: string | null;
}

export function readParticulars(db: Db, partId: number): ParticularsRow {
  const row = db
    .prepare<[number], ParticularsRow>(
      `SELECT title, drawing, drawing_issue AS drawingIssue, tool FROM part_particulars
       WHERE part_id = ? ORDER BY id DESC LIMIT 1`,
    )
    .get(partId);
  return row ?? { title: null, drawing: null, drawingIssue: null, tool: null };
}

/** Parts on one line each, those that came last first; `q` is any stretch of serial, title, drawing or work order. */
export function listParts(db: Db, { q = '', limit }: { q?: string | undefined; limit: number }): Parts {
  const ids = q === '' ? latestParts(db, limit) : findParts(db, q);
  const rows = db
    .prepare<[string], PartRow>(
      `SELECT parts.id, serial, ${latest('title')} AS title, ${latest('drawing')} AS drawing, ${VERDICT} AS verdict,
         ${FAILED} AS failed
       FROM parts WHERE id IN (SELECT value FROM json_each(?)) ORDER BY id DESC`,
    )
    .all(JSON.stringify(ids.slice(0, limit)));
  const total = q === '' ? (db.prepare<[], number>('SELECT count(*) FROM parts').pluck().get() ?? 0) : ids.length;
  return { parts: rows.map((row) => lineOf(db, row)), total };
}

function latestParts(db: Db, limit: number): number[] {
  return db.prepare<[number], number>('SELECT id FROM parts ORDER BY id DESC LIMIT ?').pluck().all(limit);
}

/** Every part like a word, in one pass: counting them apart would compare the word with every part again. */
function findParts(db: Db, q: string): number[] {
  return db
    .prepare<object, number>(`SELECT id FROM (${FOUND}) ORDER BY id DESC`)
    .pluck()
    .all({ q: `%${q.replace(/[\\%_]/g, '\\$&')}%` });
}

/** Parts whose particulars name this tool now, those that came last first. */
export function listPartsOfTool(db: Db, tool: string): PartLine[] {
  return db
    .prepare<[string], PartRow>(
      `SELECT parts.id, serial, ${latest('title')} AS title, ${latest('drawing')} AS drawing, ${VERDICT} AS verdict,
         ${FAILED} AS failed
       FROM parts WHERE id IN (SELECT part_id FROM part_particulars AS about WHERE tool = ? AND ${IS_LATEST})
       ORDER BY id DESC`,
    )
    .all(tool)
    .map((row) => lineOf(db, row));
}

/** Runs whose load holds this part now, in order of time. */
export function readRunsOfPart(db: Db, partId: number): number[] {
  return db
    .prepare<[number], number>(
      `SELECT runs.id FROM load_parts JOIN loads ON loads.id = load_id JOIN runs ON runs.id = run_id
       WHERE part_id = ? AND loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id) ORDER BY from_ms, runs.id`,
    )
    .pluck()
    .all(partId);
}

/** Parts by serial, and those whose particulars name a tool now. */
export function readSharers(
  db: Db,
  serials: readonly string[],
  tool: string | null,
): { serial: string; verdict: PartLine['verdict']; failedTest: boolean; onTool: boolean }[] {
  return db
    .prepare<object, { serial: string; verdict: PartLine['verdict']; failed: number; onTool: number }>(
      `SELECT serial, coalesce(${latest('tool')} = @tool, 0) AS onTool, ${VERDICT} AS verdict, ${FAILED} AS failed
       FROM parts WHERE id IN (
         SELECT part_id FROM part_particulars AS about WHERE tool = @tool AND ${IS_LATEST}
         UNION SELECT id FROM parts WHERE serial IN (SELECT value FROM json_each(@serials)))
       ORDER BY serial`,
    )
    .all({ serials: JSON.stringify(serials), tool })
    .map(({ serial, verdict, failed, onTool }) => ({
      serial,
      verdict,
      failedTest: failed === 1,
      onTool: onTool === 1,
    }));
}

/** Of a part's latest judged run; of that run's latest judgement. */
const VERDICT = `(
  SELECT evaluation_parts.verdict FROM evaluation_parts JOIN evaluations ON evaluations.id = evaluation_id
  JOIN runs ON runs.id = run_id WHERE part_id = parts.id ORDER BY from_ms DESC, evaluation_id DESC LIMIT 1)`;

const FAILED = "EXISTS (SELECT 1 FROM part_results_now WHERE part_id = parts.id AND outcome = 'failed')";

/** What a part's particulars say now. */
function latest(column: 'title' | 'drawing' | 'tool'): string {
  return `(SELECT ${column} FROM part_particulars WHERE part_id = parts.id ORDER BY id DESC LIMIT 1)`;
}

const IS_LATEST = 'about.id = (SELECT max(id) FROM part_particulars WHERE part_id = about.part_id)';

const FOUND = `
  SELECT id FROM parts WHERE serial LIKE @q ESCAPE '\\'
  UNION
  SELECT part_id FROM part_particulars AS about
  WHERE (title LIKE @q ESCAPE '\\' OR drawing LIKE @q ESCAPE '\\') AND ${IS_LATEST}
  UNION
  SELECT part_id FROM loads JOIN load_parts ON load_id = loads.id
  WHERE work_order LIKE @q ESCAPE '\\' AND loads.id = (SELECT max(id) FROM loads AS other WHERE other.run_id = loads.run_id)`;

interface PartRow {
  readonly id: number;
  readonly serial: string;
  readonly title: string | null;
  readonly drawing: string | null;
  readonly verdict: PartLine['verdict'];
  readonly failed: number;
}

function lineOf(db: Db, row: PartRow): PartLine {
  const cured = db
    .prepare<[number], { run: number; fromMs: number; quantity: number }>(
      `SELECT runs.id AS run, from_ms AS fromMs, quantity
       FROM load_parts JOIN loads ON loads.id = load_id JOIN runs ON runs.id = run_id
       WHERE part_id = ? AND loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id) ORDER BY from_ms, runs.id`,
    )
    .all(row.id);
  return {
    serial: row.serial,
    title: row.title,
    drawing: row.drawing,
    quantity: Math.max(1, ...cured.map(({ quantity }) => quantity)),
    runs: cured.map(({ run }) => run),
    verdict: row.verdict,
    failedTest: row.failed === 1,
    lastRunAt: cured.length === 0 ? null : isoFromMs(cured[cured.length - 1]?.fromMs ?? 0),
  };
}

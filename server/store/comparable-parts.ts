import type { Db } from './database.ts';

/** Parts by what they are and when and by what they were cured; null leaves it open. */
export interface PartScope {
  readonly drawing: string | null;
  /** `SR-180`, or `SR-180/B` for one issue. */
  readonly cycle: string | null;
  readonly fromMs: number | null;
  readonly untilMs: number | null;
}

/** A part, one of its runs within the scope, and what is on record of both on a line. */
export interface ComparablePart {
  readonly partId: number;
  readonly serial: string;
  readonly run: number;
  readonly fromMs: number;
  readonly vessel: string | null;
  readonly cycle: string | null;
  readonly setBy: string;
  readonly drawingIssue: string | null;
  readonly tool: string | null;
  readonly hasFailed: number;
  readonly hasPassed: number;
}

/** Parts within a scope, each with its first run there, in order of time. */
export function listComparable(db: Db, scope: PartScope): ComparablePart[] {
  const rows = db.prepare<[PartScope], ComparablePart>(SELECT).all(scope);
  const first = new Map<number, ComparablePart>();
  for (const row of rows) if (!first.has(row.partId)) first.set(row.partId, row);
  return [...first.values()];
}

/** Rolls and kits a part came from, and their batches, as they are known now. */
export function readItemsOfPart(db: Db, partId: number): { kind: 'roll' | 'kit' | 'batch'; code: string }[] {
  return db
    .prepare<[number], { kind: 'roll' | 'kit' | 'batch'; code: string }>(
      `WITH RECURSIVE above (item_id) AS (
         SELECT item_id FROM part_materials_now WHERE part_id = ?
         UNION SELECT parent_id FROM above
           JOIN material_events_now AS event ON event.item_id = above.item_id AND parent_id IS NOT NULL)
       SELECT kind, code FROM above JOIN material_items ON material_items.id = item_id
       UNION
       SELECT 'batch', batches.code FROM above JOIN material_events_now AS event ON event.item_id = above.item_id
         JOIN batches ON batches.id = batch_id
       ORDER BY code`,
    )
    .all(partId);
}

const SELECT = `
  SELECT parts.id AS partId, serial, runs.id AS run, from_ms AS fromMs, vessels.name AS vessel,
    cycles.code || ' issue ' || cycles.issue AS cycle, loads.by AS setBy,
    drawing_issue AS drawingIssue, tool,
    EXISTS (SELECT 1 FROM part_results_now WHERE part_id = parts.id AND outcome = 'failed') AS hasFailed,
    EXISTS (SELECT 1 FROM part_results_now WHERE part_id = parts.id AND outcome = 'passed') AS hasPassed
  FROM runs
  JOIN loads ON loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id)
  JOIN load_parts ON load_id = loads.id
  JOIN parts ON parts.id = load_parts.part_id
  LEFT JOIN vessels ON vessels.id = vessel_id
  LEFT JOIN cycles ON cycles.id = cycle_id
  LEFT JOIN part_particulars AS about
    ON about.id = (SELECT max(id) FROM part_particulars WHERE part_id = parts.id)
  WHERE (@drawing IS NULL OR drawing = @drawing)
    AND (@cycle IS NULL OR cycles.code = @cycle OR cycles.code || '/' || cycles.issue = @cycle)
    AND (@fromMs IS NULL OR from_ms >= @fromMs) AND (@untilMs IS NULL OR from_ms < @untilMs)
  ORDER BY from_ms, runs.id, load_parts.n`;

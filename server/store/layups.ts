import type { Debulk, Layup, LayupView } from '../contract/layups.ts';
import type { Db } from './database.ts';
import { readParticulars } from './parts.ts';
import { keepTool } from './tools.ts';

/** Writes how a part was laid up, with its debulks. */
export function insertLayup(db: Db, partId: number, layup: Layup): void {
  const { tool, laminate, debulks, deed, ...figures } = layup;
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO part_layups (part_id, tool_id, work_order, customer, thickness_mm, plies, fibre_fraction, laminate,
         density_kg_m3, specific_heat_j_kg_k, conductivity_w_m_k, resin_density_kg_m3, source, began_at, ended_at,
         room_c, humidity_percent, reason, at, by)
       VALUES (@partId, @toolId, @workOrder, @customer, @thicknessMm, @plies, @fibreFraction, @laminate,
         @densityKgM3, @specificHeatJKgK, @conductivityWMK, @resinDensityKgM3, @source, @beganAt, @endedAt,
         @roomC, @humidityPercent, @reason, @at, @by)`,
    )
    .run({
      partId,
      toolId: tool === null ? null : keepTool(db, tool),
      ...figures,
      ...(laminate ?? NO_LAMINATE),
      laminate: laminate?.name ?? null,
      ...deed,
    });
  const insert = db.prepare(
    'INSERT INTO layup_debulks (layup_id, n, began_at, minutes, vacuum, vacuum_unit) VALUES (?, ?, ?, ?, ?, ?)',
  );
  debulks.forEach(({ at, minutes, vacuum, vacuumUnit }, n) => {
    insert.run(lastInsertRowid, n, at, minutes, vacuum, vacuumUnit);
  });
}

/** Lay-ups on record of a part, latest first: the first of them holds. */
export function readLayups(db: Db, partId: number): Layup[] {
  return db
    .prepare<[number], LayupRow>(`${SELECT} WHERE part_id = ? ORDER BY part_layups.id DESC`)
    .all(partId)
    .map((row) => layupOf(db, row));
}

export function findLayup(db: Db, partId: number): Layup | null {
  const row = db
    .prepare<[number], LayupRow>(`${SELECT} WHERE part_id = ? ORDER BY part_layups.id DESC LIMIT 1`)
    .get(partId);
  return row === undefined ? null : layupOf(db, row);
}

/** The other part that was laid up last by the same drawing or on the same tool; by both before by one of them. */
export function findSimilarLayup(
  db: Db,
  { serial, drawing, tool }: { serial: string; drawing: string | null; tool: string | null },
): LayupView['similar'] {
  const row = db
    .prepare<object, { partId: number; serial: string; sameDrawing: number; sameTool: number }>(
      `WITH alike AS (
         SELECT part_id, drawing = @drawing AS sameDrawing, tool = @tool AS sameTool FROM part_particulars AS about
         WHERE (drawing = @drawing OR tool = @tool)
           AND id = (SELECT max(id) FROM part_particulars WHERE part_id = about.part_id))
       SELECT alike.part_id AS partId, serial, coalesce(sameDrawing, 0) AS sameDrawing, coalesce(sameTool, 0) AS sameTool
       FROM alike JOIN parts ON parts.id = alike.part_id
         JOIN part_layups ON part_layups.part_id = alike.part_id
       WHERE serial <> @serial
       ORDER BY coalesce(sameDrawing, 0) + coalesce(sameTool, 0) DESC, part_layups.id DESC LIMIT 1`,
    )
    .get({ serial, drawing, tool });
  const layup = row === undefined ? null : findLayup(db, row.partId);
  if (row === undefined || layup === null) return null;
  const { title, drawing: itsDrawing, drawingIssue } = readParticulars(db, row.partId);
  const shares: ('drawing' | 'tool')[] = [];
  if (row.sameDrawing === 1) shares.push('drawing');
  if (row.sameTool === 1) shares.push('tool');
  return { serial: row.serial, shares, title, drawing: itsDrawing, drawingIssue, layup };
}

const NO_LAMINATE = {
  densityKgM3: null,
  specificHeatJKgK: null,
  conductivityWMK: null,
  resinDensityKgM3: null,
  source: null,
};

const SELECT = `
  SELECT part_layups.id, tools.code AS tool, work_order AS workOrder, customer, thickness_mm AS thicknessMm, plies,
    fibre_fraction AS fibreFraction, laminate, density_kg_m3 AS densityKgM3, specific_heat_j_kg_k AS specificHeatJKgK,
    conductivity_w_m_k AS conductivityWMK, resin_density_kg_m3 AS resinDensityKgM3, source, began_at AS beganAt,
    ended_at AS endedAt, room_c AS roomC, humidity_percent AS humidityPercent, reason, at, by
  FROM part_layups LEFT JOIN tools ON tools.id = tool_id`;

interface LayupRow extends Omit<Layup, 'laminate' | 'debulks' | 'deed'> {
  readonly id: number;
  readonly laminate: string | null;
  readonly densityKgM3: number;
  readonly specificHeatJKgK: number;
  readonly conductivityWMK: number;
  readonly resinDensityKgM3: number | null;
  readonly source: string;
  readonly at: string;
  readonly by: string;
}

function layupOf(db: Db, row: LayupRow): Layup {
  const { id, laminate, densityKgM3, specificHeatJKgK, conductivityWMK, resinDensityKgM3, source, at, by, ...rest } =
    row;
  const figures = { densityKgM3, specificHeatJKgK, conductivityWMK, resinDensityKgM3, source };
  return {
    ...rest,
    laminate: laminate === null ? null : { name: laminate, ...figures },
    debulks: db
      .prepare<[number], Debulk>(
        `SELECT began_at AS at, minutes, vacuum, vacuum_unit AS vacuumUnit FROM layup_debulks
         WHERE layup_id = ? ORDER BY n`,
      )
      .all(id),
    deed: { at, by },
  };
}

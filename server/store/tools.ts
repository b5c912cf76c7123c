import { DomainError } from '../../models/errors.ts';
import type { ToolRecord } from '../contract/tool-record.ts';
import type { ToolLine } from '../contract/tools.ts';
import type { Db } from './database.ts';

/** The row of a tool, made where its code is new. */
export function keepTool(db: Db, code: string): number {
  const known = db.prepare<[string], number>('SELECT id FROM tools WHERE code = ?').pluck().get(code);
  return known ?? Number(db.prepare('INSERT INTO tools (code) VALUES (?)').run(code).lastInsertRowid);
}

/** The row of a tool that must be there. */
export function requireTool(db: Db, code: string): number {
  const id = db.prepare<[string], number>('SELECT id FROM tools WHERE code = ?').pluck().get(code);
  if (id === undefined) throw new DomainError('not-found', `There is no tool "${code}"`, { tool: code });
  return id;
}

export function insertToolRecord(db: Db, toolId: number, { material, deed, ...record }: ToolRecord): void {
  db.prepare(
    `INSERT INTO tool_records (tool_id, title, drawing, thickness_mm, material, density_kg_m3, specific_heat_j_kg_k,
       conductivity_w_m_k, source, reason, at, by)
     VALUES (@toolId, @title, @drawing, @thicknessMm, @material, @densityKgM3, @specificHeatJKgK,
       @conductivityWMK, @source, @reason, @at, @by)`,
  ).run({ toolId, ...record, ...(material ?? NO_MATERIAL), material: material?.name ?? null, ...deed });
}

/** Records of a tool, latest first: the first of them holds. */
export function readToolRecords(db: Db, toolId: number): ToolRecord[] {
  return db.prepare<[number], ToolRow>(`${SELECT} WHERE tool_id = ? ORDER BY id DESC`).all(toolId).map(recordOf);
}

export function findToolRecord(db: Db, code: string): ToolRecord | null {
  const row = db
    .prepare<[string], ToolRow>(
      `${SELECT} WHERE tool_id = (SELECT id FROM tools WHERE code = ?) ORDER BY id DESC LIMIT 1`,
    )
    .get(code);
  return row === undefined ? null : recordOf(row);
}

/** Every tool there is, by its code. */
export function listTools(db: Db): ToolLine[] {
  return db
    .prepare<[], { code: string; parts: number }>(
      `SELECT code, (SELECT count(*) FROM part_particulars AS about WHERE tool = code
         AND about.id = (SELECT max(id) FROM part_particulars WHERE part_id = about.part_id)) AS parts
       FROM tools ORDER BY code`,
    )
    .all()
    .map((line) => ({ ...line, record: findToolRecord(db, line.code) }));
}

const NO_MATERIAL = { densityKgM3: null, specificHeatJKgK: null, conductivityWMK: null, source: null };

const SELECT = `
  SELECT title, drawing, thickness_mm AS thicknessMm, material, density_kg_m3 AS densityKgM3,
    specific_heat_j_kg_k AS specificHeatJKgK, conductivity_w_m_k AS conductivityWMK, source, reason, at, by
  FROM tool_records`;

interface ToolRow {
  readonly title: string | null;
  readonly drawing: string | null;
  readonly thicknessMm: number | null;
  readonly material: string | null;
  readonly densityKgM3: number;
  readonly specificHeatJKgK: number;
  readonly conductivityWMK: number;
  readonly source: string;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

function recordOf({ title, drawing, thicknessMm, material, reason, at, by, ...figures }: ToolRow): ToolRecord {
  return {
    title,
    drawing,
    thicknessMm,
    material: material === null ? null : { name: material, ...figures },
    reason,
    deed: { at, by },
  };
}

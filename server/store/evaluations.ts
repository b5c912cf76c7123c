import { deflateRawSync, inflateRawSync } from 'node:zlib';
import { DomainError } from '../../models/errors.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { EvaluationLine, EvaluationView } from '../contract/runs.ts';
import { sha256Of } from './canonical.ts';
import type { Db } from './database.ts';
import { keepPart } from './parts.ts';

/** SHA-256 of everything a judgement is computed from. */
export interface EvaluationInputs {
  readonly readings: string;
  readonly layout: string;
  readonly load: string;
  readonly cycle: string;
  readonly resin: string | null;
  readonly decisions: string;
  /** Null where the cycle does not ask for material, or none is on record. */
  readonly materials: string | null;
  /** Null where no instrument of its channels is on record. */
  readonly instruments: string | null;
}

export interface NewEvaluation {
  readonly run: number;
  readonly because: string;
  readonly engine: string;
  readonly inputs: EvaluationInputs;
  readonly document: Evaluation;
  readonly at: string;
  readonly by: string;
}

/** Adds a judgement; earlier ones of the run stay as they were. */
export function insertEvaluation(db: Db, { run, because, engine, inputs, document, at, by }: NewEvaluation): number {
  const text = JSON.stringify(document);
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO evaluations (run_id, because, engine, verdict, undecided, not_met, cannot_tell, readings_sha256,
         layout_sha256, load_sha256, cycle_sha256, resin_sha256, decisions_sha256, materials_sha256,
         instruments_sha256, sha256, packed, at, by)
       VALUES (@run, @because, @engine, @verdict, @undecided, @notMet, @cannotTell, @readings, @layout, @load, @cycle,
         @resin, @decisions, @materials, @instruments, @sha256, @packed, @at, @by)`,
    )
    .run({
      run,
      because,
      engine,
      verdict: document.verdict,
      undecided: JSON.stringify([...new Set(document.decisions.map(({ channel }) => channel))]),
      notMet: JSON.stringify(limitsWith(document, 'not-met')),
      cannotTell: JSON.stringify(limitsWith(document, 'cannot-tell')),
      ...inputs,
      sha256: sha256Of(text),
      packed: deflateRawSync(text),
      at,
      by,
    });
  const insert = db.prepare('INSERT INTO evaluation_parts (evaluation_id, part_id, verdict) VALUES (?, ?, ?)');
  for (const { part, verdict } of document.parts) {
    if (part !== null) insert.run(lastInsertRowid, keepPart(db, part), verdict);
  }
  return Number(lastInsertRowid);
}

/** The judgements of a run, latest first, without their documents. */
export function listEvaluations(db: Db, run: number): EvaluationLine[] {
  return db.prepare<[number], EvaluationRow>(`${SELECT} WHERE run_id = ? ORDER BY id DESC`).all(run).map(lineOf);
}

export function findLatestEvaluation(db: Db, run: number): EvaluationView | null {
  const row = db.prepare<[number], EvaluationRow>(`${SELECT} WHERE run_id = ? ORDER BY id DESC LIMIT 1`).get(run);
  return row === undefined ? null : { ...lineOf(row), document: documentOf(row) };
}

export function requireEvaluation(db: Db, run: number, id: number): EvaluationView {
  const row = db.prepare<[number, number], EvaluationRow>(`${SELECT} WHERE run_id = ? AND id = ?`).get(run, id);
  if (row !== undefined) return { ...lineOf(row), document: documentOf(row) };
  throw new DomainError('not-found', `Run ${run} has no evaluation ${id}`, { run, evaluation: id });
}

/** The first evaluation whose document no longer has its hash. */
export function findBrokenEvaluation(db: Db): number | null {
  const rows = db.prepare<[], { id: number; sha256: string; packed: Buffer }>(
    'SELECT id, sha256, packed FROM evaluations',
  );
  for (const { id, sha256, packed } of rows.iterate()) if (sha256Of(inflateRawSync(packed)) !== sha256) return id;
  return null;
}

interface EvaluationRow {
  readonly id: number;
  readonly because: string;
  readonly engine: string;
  readonly verdict: EvaluationLine['verdict'];
  readonly readings_sha256: string;
  readonly layout_sha256: string;
  readonly load_sha256: string;
  readonly cycle_sha256: string;
  readonly resin_sha256: string | null;
  readonly decisions_sha256: string;
  readonly materials_sha256: string | null;
  readonly instruments_sha256: string | null;
  readonly sha256: string;
  readonly packed: Buffer;
  readonly at: string;
  readonly by: string;
}

const SELECT = 'SELECT * FROM evaluations';

function lineOf(row: EvaluationRow): EvaluationLine {
  return {
    id: row.id,
    deed: { at: row.at, by: row.by },
    engine: row.engine,
    verdict: row.verdict,
    because: row.because,
    inputs: {
      readings: row.readings_sha256,
      layout: row.layout_sha256,
      load: row.load_sha256,
      cycle: row.cycle_sha256,
      resin: row.resin_sha256,
      decisions: row.decisions_sha256,
      ...(row.materials_sha256 === null ? {} : { materials: row.materials_sha256 }),
      ...(row.instruments_sha256 === null ? {} : { instruments: row.instruments_sha256 }),
    },
    sha256: row.sha256,
  };
}

function documentOf({ packed }: EvaluationRow): Evaluation {
  return JSON.parse(inflateRawSync(packed).toString()) as Evaluation;
}

/** Names of the limits with an outcome in any part, each once, in the order the findings stand. */
function limitsWith(document: Evaluation, outcome: string): string[] {
  const findings = document.parts.flatMap((part) => part.findings).filter((finding) => finding.outcome === outcome);
  return [...new Set(findings.map(({ limit }) => limit))];
}

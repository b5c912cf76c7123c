import type { RunLine, Runs, RunsQuery } from '../contract/runs.ts';
import type { Db } from './database.ts';
import { isoFromMs } from './instants.ts';
import { growingSources } from './live-readings.ts';
import { findOpenRun } from './live-runs.ts';

/** Runs on one line each, latest first. */
export function listRuns(db: Db, query: Partial<RunsQuery> = {}): Runs {
  const { after = 0, limit = 50 } = query;
  const { where, values } = conditionsOf(query);
  const total = db.prepare<object, number>(`SELECT count(*) ${FROM} ${where}`).pluck().get(values) ?? 0;
  const runs = db
    .prepare<object, LineRow>(`${SELECT} ${where} ORDER BY runs.from_ms DESC, runs.id DESC LIMIT @limit OFFSET @after`)
    .all({ ...values, limit, after })
    .map((row) => lineOf(db, row));
  return { runs, total, next: after + runs.length < total ? after + runs.length : null };
}

export function findRunLine(db: Db, run: number): RunLine | undefined {
  const row = db.prepare<[number], LineRow>(`${SELECT} WHERE runs.id = ?`).get(run);
  return row === undefined ? undefined : lineOf(db, row);
}

/** Judged runs whose load names an issue of a cycle, in order of time. */
export function listJudgedRuns(db: Db, code: string, issue: string): number[] {
  return db
    .prepare<[string, string], number>(
      `SELECT runs.id ${FROM} WHERE code = ? AND issue = ? AND evaluations.id IS NOT NULL ORDER BY runs.from_ms, runs.id`,
    )
    .pluck()
    .all(code, issue);
}

/** A run that waits for a person, with the channels of the sensors to decide on. */
export interface RunInNeed {
  readonly run: RunLine;
  readonly undecided: readonly string[];
}

/** Runs that wait for a person, latest first: without a load, with a suspect to decide, or that cannot be told. */
export function listRunsInNeed(db: Db, limit: number): RunInNeed[] {
  return db
    .prepare<[number], LineRow>(
      `${SELECT} WHERE loads.id IS NULL OR loads.cycle_id IS NULL OR evaluations.undecided <> '[]'
         OR evaluations.verdict = 'cannot-tell' ORDER BY runs.from_ms DESC, runs.id DESC LIMIT ?`,
    )
    .all(limit)
    .map((row) => ({ run: lineOf(db, row), undecided: JSON.parse(row.undecided ?? '[]') }));
}

const FROM = `
  FROM runs
  LEFT JOIN vessels ON vessels.id = runs.vessel_id
  LEFT JOIN loads ON loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id)
  LEFT JOIN cycles ON cycles.id = loads.cycle_id
  LEFT JOIN live_runs ON live_runs.run_id = runs.id AND live_runs.closed_at IS NULL
  LEFT JOIN evaluations ON evaluations.id = (SELECT max(id) FROM evaluations WHERE run_id = runs.id)`;

const SELECT = `
  SELECT runs.id AS run, vessels.name AS vessel, runs.from_ms, runs.until_ms, loads.id AS load_id,
         live_runs.begun_ms, live_runs.ended_ms, loads.work_order, cycles.code, cycles.issue, evaluations.verdict, evaluations.undecided,
         evaluations.not_met, evaluations.cannot_tell ${FROM}`;

interface LineRow {
  readonly run: number;
  readonly vessel: string | null;
  readonly from_ms: number;
  readonly until_ms: number;
  /** Of a run that is open. */
  readonly begun_ms: number | null;
  readonly ended_ms: number | null;
  readonly load_id: number | null;
  readonly work_order: string | null;
  readonly code: string | null;
  readonly issue: string | null;
  readonly verdict: RunLine['verdict'];
  readonly undecided: string | null;
  readonly not_met: string | null;
  readonly cannot_tell: string | null;
}

function lineOf(db: Db, row: LineRow): RunLine {
  const { code, issue } = row;
  return {
    run: row.run,
    vessel: row.vessel,
    ...(row.begun_ms === null ? summaryOf(db, row) : summaryOfOpen(db, row)),
    workOrder: row.work_order,
    cycle: code === null || issue === null ? null : { code, issue },
    parts: row.load_id === null ? [] : readSerials(db, row.load_id),
    state: row.load_id === null ? 'awaiting-load' : code === null ? 'awaiting-cycle' : 'judged',
    live: row.begun_ms === null ? null : row.ended_ms === null ? 'running' : 'ended',
    verdict: row.verdict,
    undecided: JSON.parse(row.undecided ?? '[]').length,
    notMet: JSON.parse(row.not_met ?? '[]'),
    cannotTell: JSON.parse(row.cannot_tell ?? '[]'),
  };
}

type Summary = Pick<RunLine, 'recorder' | 'scans' | 'from' | 'until'>;

function summaryOf(db: Db, { run, from_ms, until_ms }: LineRow): Summary {
  const row = db
    .prepare<[number], { recorder: string | null; scans: number }>(
      `SELECT coalesce(recorders.name, CASE documents.format WHEN 'dwellbook-source/1'
                THEN json_extract(documents.text, '$.name') END) AS recorder, scans
       FROM run_sources LEFT JOIN recorders ON recorders.id = recorder_id
       JOIN documents ON documents.sha256 = layout_sha256
       WHERE run_id = ? AND run_sources.id NOT IN (SELECT replaces_id FROM run_sources WHERE replaces_id IS NOT NULL)
       ORDER BY n LIMIT 1`,
    )
    .get(run);
  return { ...(row ?? { recorder: null, scans: 0 }), from: isoFromMs(from_ms), until: isoFromMs(until_ms) };
}

/** A run that is open goes as far as its last scan. */
function summaryOfOpen(db: Db, { run, from_ms }: LineRow): Summary {
  const live = findOpenRun(db, run);
  const growing = live === undefined ? [] : growingSources(db, live);
  const [first] = growing.toSorted((a, b) => b.head.scans - a.head.scans);
  const untilMs = Math.max(from_ms, ...growing.map(({ head }) => head.lastMs ?? from_ms));
  return {
    recorder: first?.settings.document.name ?? null,
    scans: first?.head.scans ?? 0,
    from: isoFromMs(from_ms),
    until: isoFromMs(untilMs),
  };
}

function readSerials(db: Db, loadId: number): string[] {
  return db
    .prepare<[number], string>(
      'SELECT serial FROM load_parts JOIN parts ON parts.id = part_id WHERE load_id = ? ORDER BY n',
    )
    .pluck()
    .all(loadId);
}

function conditionsOf(query: Partial<RunsQuery>): { where: string; values: Record<string, unknown> } {
  const conditions: string[] = [];
  const values: Record<string, unknown> = {};
  const add = (condition: string, name: string, value: unknown) => {
    if (value === undefined) return;
    conditions.push(condition);
    values[name] = value;
  };
  add('vessels.name = @vessel', 'vessel', query.vessel);
  add("(cycles.code = @cycle OR cycles.code || '/' || cycles.issue = @cycle)", 'cycle', query.cycle);
  add(
    'EXISTS (SELECT 1 FROM load_parts JOIN parts ON parts.id = part_id WHERE load_id = loads.id AND serial = @part)',
    'part',
    query.part,
  );
  add('evaluations.verdict = @verdict', 'verdict', query.verdict);
  add('runs.from_ms >= @from', 'from', query.from === undefined ? undefined : Date.parse(query.from));
  add('runs.from_ms < @until', 'until', query.until === undefined ? undefined : Date.parse(query.until));
  if (query.state !== undefined) conditions.push(STATES[query.state]);
  return { where: conditions.length === 0 ? '' : `WHERE ${conditions.join(' AND ')}`, values };
}

const STATES = {
  'awaiting-load': 'loads.id IS NULL',
  'awaiting-cycle': 'loads.id IS NOT NULL AND loads.cycle_id IS NULL',
  judged: 'loads.cycle_id IS NOT NULL',
} as const;

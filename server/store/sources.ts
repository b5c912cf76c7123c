import type { Layout } from '../../models/log/layout.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import type { RunFile, RunSource } from '../contract/runs.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';
import { isoFromMs } from './instants.ts';
import { insertReadings, readReadings } from './reading-blocks.ts';
import { chainOfReadings } from './reading-chain.ts';

export interface NewSource {
  readonly runId: number;
  readonly recorderId: number | null;
  /** The source whose files are read again by another layout. */
  readonly replacesId: number | null;
  readonly layout: Layout;
  readonly log: ReadLog;
  readonly files: readonly { readonly name: string; readonly fileId: number }[];
  readonly at: string;
  readonly by: string;
}

/** Writes one source of a run: its files, its readings and the hash over them. */
export function insertSource(db: Db, source: NewSource): { readonly n: number; readonly chainSha256: string } {
  const { timeMs } = source.log.readings;
  const chainSha256 = chainOfReadings(source.log.readings);
  const n = 1 + countSourcesOf(db, source.runId);
  const sourceId = Number(
    db
      .prepare(
        `INSERT INTO run_sources (run_id, n, recorder_id, replaces_id, layout_sha256, chain_sha256, scans, from_ms,
           until_ms, repairs, passed_over, at, by)
         VALUES (@runId, @n, @recorderId, @replacesId, @layout, @chain, @scans, @from, @until, @repairs, @passedOver,
           @at, @by)`,
      )
      .run({
        runId: source.runId,
        n,
        recorderId: source.recorderId,
        replacesId: source.replacesId,
        layout: keepDocument(db, source.layout),
        chain: chainSha256,
        scans: timeMs.length,
        from: timeMs[0],
        until: timeMs.at(-1),
        repairs: JSON.stringify(source.log.repairs),
        passedOver: JSON.stringify(source.log.passedOver),
        at: source.at,
        by: source.by,
      }).lastInsertRowid,
  );
  const file = db.prepare('INSERT INTO source_files (source_id, n, file_id, name) VALUES (?, ?, ?, ?)');
  source.files.forEach(({ fileId, name }, place) => {
    file.run(sourceId, place, fileId, name);
  });
  insertReadings(db, sourceId, source.log.readings);
  return { n, chainSha256 };
}

/** A source with the rows it is and comes from. */
export interface StoredSource extends RunSource {
  readonly id: number;
  readonly recorderId: number | null;
}

/** The sources a run is judged by, in order: those no later one reads again. */
export function readSources(db: Db, runId: number): StoredSource[] {
  const rows = db
    .prepare<[number], SourceRow>(
      `SELECT run_sources.*, recorders.name AS recorder FROM run_sources
       LEFT JOIN recorders ON recorders.id = run_sources.recorder_id
       WHERE run_id = ? AND run_sources.id NOT IN (SELECT replaces_id FROM run_sources WHERE replaces_id IS NOT NULL)
       ORDER BY n`,
    )
    .all(runId);
  let files = 0;
  return rows.map((row) => {
    const own = readFiles(db, row.id, files);
    files += own.length;
    return {
      id: row.id,
      recorderId: row.recorder_id,
      n: row.n,
      recorder: row.recorder,
      layout: readDocument<Layout>(db, row.layout_sha256),
      layoutSha256: row.layout_sha256,
      files: own,
      chainSha256: row.chain_sha256,
      scans: row.scans,
      from: isoFromMs(row.from_ms),
      until: isoFromMs(row.until_ms),
      repairs: JSON.parse(row.repairs),
      passedOver: JSON.parse(row.passed_over),
      recorded: { at: row.at, by: row.by },
    };
  });
}

/** One source as the reader gave it. */
export function readSourceLog(db: Db, source: StoredSource): ReadLog {
  return {
    readings: readReadings(db, source.id, source.scans, source.layout.channels),
    repairs: source.repairs,
    passedOver: source.passedOver,
  };
}

/** The first source whose stored readings no longer have the hash they were recorded with. */
export function findBrokenSource(db: Db): string | null {
  for (const row of db.prepare<[], SourceRow>('SELECT *, NULL AS recorder FROM run_sources ORDER BY id').all()) {
    const { channels } = readDocument<Layout>(db, row.layout_sha256);
    const readings = readReadings(db, row.id, row.scans, channels);
    if (chainOfReadings(readings) !== row.chain_sha256) return `run ${row.run_id}, source ${row.n}`;
  }
  return null;
}

export function countSources(db: Db): number {
  return db.prepare<[], number>('SELECT count(*) FROM run_sources').pluck().get() ?? 0;
}

function countSourcesOf(db: Db, runId: number): number {
  return db.prepare<[number], number>('SELECT count(*) FROM run_sources WHERE run_id = ?').pluck().get(runId) ?? 0;
}

function readFiles(db: Db, sourceId: number, before: number): RunFile[] {
  return db
    .prepare<[number, number], RunFile>(
      `SELECT source_files.n + 1 + ? AS n, source_files.name, files.bytes, files.sha256
       FROM source_files JOIN files ON files.id = source_files.file_id WHERE source_id = ? ORDER BY source_files.n`,
    )
    .all(before, sourceId);
}

interface SourceRow {
  readonly id: number;
  readonly run_id: number;
  readonly n: number;
  readonly recorder: string | null;
  readonly recorder_id: number | null;
  readonly layout_sha256: string;
  readonly chain_sha256: string;
  readonly scans: number;
  readonly from_ms: number;
  readonly until_ms: number;
  readonly repairs: string;
  readonly passed_over: string;
  readonly at: string;
  readonly by: string;
}

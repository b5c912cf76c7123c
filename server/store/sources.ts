import type { Layout } from '../../models/log/layout.ts';
import type { LiveSource } from '../../models/log/live-source.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { channelsOf } from '../../models/log/source-channels.ts';
import type { RunFile, RunSource } from '../contract/runs.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';
import { isoFromMs } from './instants.ts';
import { type GrowingSource, growingSources, readGrowing } from './live-readings.ts';
import { findLiveRun, type LiveRunRow } from './live-runs.ts';
import { type Block, insertBlocks, packReadings, readReadings } from './reading-blocks.ts';
import { chainOfReadings } from './reading-chain.ts';
import { readSilentSources, type SilentSource } from './silent-sources.ts';

export interface NewSource {
  readonly runId: number;
  readonly recorderId: number | null;
  /** The source whose files are read again by another layout. */
  readonly replacesId: number | null;
  /** How its files are read, or the document of the live source it was. */
  readonly layout: Layout | LiveSource;
  readonly log: ReadLog;
  /** Its readings as blocks, where they are packed already. */
  readonly blocks?: readonly Block[];
  readonly files: readonly { readonly name: string; readonly fileId: number }[];
  /** Where its channels are those of an earlier source: what is added to its instants, and why. */
  readonly join?: { readonly shiftMs: number; readonly because: string } | null;
  readonly at: string;
  readonly by: string;
}

export interface InsertedSource {
  readonly id: number;
  readonly n: number;
  readonly chainSha256: string;
}

/** Writes one source of a run: its files, its readings and the hash over them. */
export function insertSource(db: Db, source: NewSource): InsertedSource {
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
  insertBlocks(db, sourceId, source.blocks ?? packReadings(source.log.readings));
  if (source.join != null) {
    const { shiftMs, because } = source.join;
    const join = 'INSERT INTO source_joins (source_id, shift_ms, because) VALUES (?, ?, ?)';
    db.prepare(join).run(sourceId, shiftMs, because);
  }
  return { id: sourceId, n, chainSha256 };
}

/** A source with the rows it is and comes from. */
export interface StoredSource extends RunSource {
  /** 0 where it has no row of its own yet, or sent nothing. */
  readonly id: number;
  readonly recorderId: number | null;
  readonly shiftMs: number;
  /** Whether its channels may be those of an earlier source, and fill what that one did not read. */
  readonly fills: boolean;
  /** The live source it still is; null where it is in blocks, or sent nothing. */
  readonly growing: GrowingSource | null;
}

/** The sources a run is judged by, in order: those no later one reads again, and of an open run those that grow. */
export function readSources(db: Db, runId: number): StoredSource[] {
  const rows = db
    .prepare<[number], SourceRow>(
      `SELECT run_sources.*, recorders.name AS recorder, shift_ms, because FROM run_sources
       LEFT JOIN recorders ON recorders.id = run_sources.recorder_id
       LEFT JOIN source_joins ON source_joins.source_id = run_sources.id
       WHERE run_id = ? AND run_sources.id NOT IN (SELECT replaces_id FROM run_sources WHERE replaces_id IS NOT NULL)
       ORDER BY n`,
    )
    .all(runId);
  let files = 0;
  const stored = rows.map((row) => {
    const own = readFiles(db, row.id, files);
    files += own.length;
    return storedOf(row, readDocument<Layout | LiveSource>(db, row.layout_sha256), own);
  });
  const live = findLiveRun(db, runId);
  if (live === undefined) return stored;
  const silent = readSilentSources(db, runId).map((source) => silentOf(live, source));
  const growing = live.closedAt === null ? growingSources(db, live) : [];
  return [...stored, ...silent, ...growing.map((source, n) => growingOf(source, stored.length + n + 1))].sort(
    (a, b) => a.n - b.n,
  );
}

/** One source as the reader gave it, by its own clock. */
export function readSourceLog(db: Db, source: StoredSource): ReadLog {
  const { repairs, passedOver } = source;
  const channels = channelsOf(source.layout);
  const readings =
    source.growing === null ? readReadings(db, source.id, source.scans, channels) : readGrowing(db, source.growing);
  return { readings, repairs, passedOver };
}

/** The first source whose stored readings no longer have the hash they were recorded with. */
export function findBrokenSource(db: Db): string | null {
  const rows = db.prepare<[], BareRow>('SELECT id, run_id, n, layout_sha256, chain_sha256, scans FROM run_sources');
  for (const row of rows.all()) {
    const document = readDocument<Layout | LiveSource>(db, row.layout_sha256);
    const readings = readReadings(db, row.id, row.scans, channelsOf(document));
    if (chainOfReadings(readings) !== row.chain_sha256) return `run ${row.run_id}, source ${row.n}`;
  }
  return null;
}

export function countSources(db: Db): number {
  return db.prepare<[], number>('SELECT count(*) FROM run_sources').pluck().get() ?? 0;
}

export function countSourcesOf(db: Db, runId: number): number {
  const sql = `SELECT (SELECT count(*) FROM run_sources WHERE run_id = @runId)
    + (SELECT count(*) FROM silent_sources WHERE run_id = @runId)`;
  return db.prepare<object, number>(sql).pluck().get({ runId }) ?? 0;
}

function readFiles(db: Db, sourceId: number, before: number): RunFile[] {
  return db
    .prepare<[number, number], RunFile>(
      `SELECT source_files.n + 1 + ? AS n, source_files.name, files.bytes, files.sha256
       FROM source_files JOIN files ON files.id = source_files.file_id WHERE source_id = ? ORDER BY source_files.n`,
    )
    .all(before, sourceId);
}

interface BareRow {
  readonly id: number;
  readonly run_id: number;
  readonly n: number;
  readonly layout_sha256: string;
  readonly chain_sha256: string;
  readonly scans: number;
}

interface SourceRow extends BareRow {
  readonly recorder: string | null;
  readonly recorder_id: number | null;
  readonly from_ms: number;
  readonly until_ms: number;
  readonly repairs: string;
  readonly passed_over: string;
  readonly shift_ms: number | null;
  readonly because: string | null;
  readonly at: string;
  readonly by: string;
}

function storedOf(row: SourceRow, layout: Layout | LiveSource, files: RunFile[]): StoredSource {
  const { shift_ms: shift, because } = row;
  return {
    id: row.id,
    recorderId: row.recorder_id,
    n: row.n,
    recorder: row.recorder,
    layout,
    layoutSha256: row.layout_sha256,
    files,
    chainSha256: row.chain_sha256,
    scans: row.scans,
    from: isoFromMs(row.from_ms + (shift ?? 0)),
    until: isoFromMs(row.until_ms + (shift ?? 0)),
    repairs: JSON.parse(row.repairs),
    passedOver: JSON.parse(row.passed_over),
    joined: shift === null || because === null ? null : { shiftS: shift / 1000, because },
    recorded: { at: row.at, by: row.by },
    shiftMs: shift ?? 0,
    fills: shift !== null || layout.format === 'dwellbook-source/1',
    growing: null,
  };
}

/** What live sources have in common before, or without, rows of their own. */
const LIVE = {
  id: 0,
  recorderId: null,
  recorder: null,
  repairs: [],
  passedOver: [],
  joined: null,
  shiftMs: 0,
} as const;

function growingOf(growing: GrowingSource, n: number): StoredSource {
  const { run, settings, head, chainSha256 } = growing;
  return {
    ...LIVE,
    n,
    layout: settings.document,
    layoutSha256: settings.sha256,
    files: [],
    repairs: [],
    passedOver: [],
    chainSha256,
    scans: head.scans,
    from: isoFromMs(head.firstMs ?? run.begunMs),
    until: isoFromMs(head.lastMs ?? run.begunMs),
    recorded: { at: settings.at, by: settings.by },
    fills: true,
    growing,
  };
}

function silentOf({ begunMs }: LiveRunRow, silent: SilentSource): StoredSource {
  return {
    ...LIVE,
    ...silent,
    files: [],
    repairs: [],
    passedOver: [],
    scans: 0,
    from: isoFromMs(begunMs),
    until: isoFromMs(begunMs),
    fills: true,
    growing: null,
  };
}

import type { LiveScan } from '../../models/log/live-source.ts';
import type { Db } from './database.ts';
import { nextArrival, reserveArrivals } from './live-arrivals.ts';
import { beginChain, type ChainHead, digestOf, extendChain, rewindChain } from './live-chain.ts';
import { adoptHeads, forgetIfOthersWrote, type Heads, headsSinceLook, readPackedScans } from './live-heads.ts';
import { findOpenRunOf, type LiveRunRow } from './live-runs.ts';
import { packScan } from './live-scan-bytes.ts';
import type { LiveSettings } from './live-sources.ts';
import { prepared } from './prepared.ts';

/** Scans of one source, read by one of its settings. */
export interface ScanBatch {
  readonly vesselId: number;
  readonly settings: LiveSettings;
  readonly scans: readonly LiveScan[];
  readonly arrivedMs: number;
}

export interface KeptBatch {
  /** Scans that were new, in order of time. */
  readonly fresh: readonly LiveScan[];
  /** Scans that were there already, figure for figure. */
  readonly known: number;
  /** Scans whose instant other figures have: the first stay. */
  readonly refused: readonly { readonly timeMs: number; readonly because: string }[];
}

/** Keeps scans of several sources in one transaction; when it returns they are on the disk, chains and all. */
export function keepScans(db: Db, batches: readonly ScanBatch[]): KeptBatch[] {
  const count = batches.reduce((sum, { scans }) => sum + scans.length, 0);
  reserveArrivals(db, count);
  const moved: MovedHeads = new Map();
  const kept = writerOf(db)(batches, moved);
  for (const [sourceId, { run, heads }] of moved) adoptHeads(db, run, sourceId, heads);
  return kept;
}

type Writer = (batches: readonly ScanBatch[], moved: MovedHeads) => KeptBatch[];

const writers = new WeakMap<Db, Writer>();

/** The transaction that writes; made once, because it runs with every commit. */
function writerOf(db: Db): Writer {
  const known = writers.get(db);
  if (known !== undefined) return known;
  const write = (batches: readonly ScanBatch[], moved: MovedHeads) => {
    forgetIfOthersWrote(db);
    return batches.map((batch) => keepBatch(db, batch, moved));
  };
  const writer = db.transaction(write).immediate;
  writers.set(db, writer);
  return writer;
}

/** Heads as they stand once the transaction is committed, by source. */
type MovedHeads = Map<number, { readonly run: LiveRunRow; readonly heads: Heads }>;

function keepBatch(db: Db, batch: ScanBatch, moved: MovedHeads): KeptBatch {
  const { settings, vesselId } = batch;
  const { sourceId, sha256 } = settings;
  const scans = batch.scans.map((scan) => toKeep(scan, settings)).sort((a, b) => a.timeMs - b.timeMs);
  const run = findOpenRunOf(db, vesselId);
  const inRun = run === undefined ? [] : scans.filter(({ timeMs }) => isWithin(run, timeMs));
  if (run === undefined || inRun.length === 0) return outcomeOf(scans, insertScans(db, batch, scans, null));
  const heads = moved.get(sourceId)?.heads ?? headsSinceLook(db, run, sourceId);
  const before = heads.get(sha256) ?? beginChain(settings.document);
  // As a rule every scan is new and later than all before: then the last is written with its chain at once.
  const expected = isLater(before, inRun) && inRun.length === scans.length ? extendChain(before, inRun) : null;
  const kept = insertScans(db, batch, scans, expected === null ? null : digestOf(expected));
  const freshInRun = kept.fresh.filter(({ timeMs }) => isWithin(run, timeMs));
  if (freshInRun.length > 0) {
    const asExpected = expected !== null && freshInRun.length === inRun.length;
    const head = asExpected ? expected : chainAnew(db, run, settings, before, freshInRun);
    moved.set(sourceId, { run, heads: new Map([...heads, [sha256, head]]) });
  }
  return outcomeOf(scans, kept);
}

interface ScanToKeep extends LiveScan {
  readonly packed: Buffer;
}

interface Inserted {
  readonly fresh: readonly ScanToKeep[];
  readonly refused: KeptBatch['refused'];
}

/** Writes scans in order of time, the last of them with the chain that holds if all of them are new. */
function insertScans(db: Db, batch: ScanBatch, scans: readonly ScanToKeep[], chain: Buffer | null): Inserted {
  const { settings, arrivedMs } = batch;
  const insert = prepared<unknown[]>(db, INSERT);
  const fresh: ScanToKeep[] = [];
  const refused: { timeMs: number; because: string }[] = [];
  scans.forEach((scan, n) => {
    const { timeMs, sequence, packed } = scan;
    const ownChain = n === scans.length - 1 && fresh.length === n ? chain : null;
    const row = [settings.sourceId, timeMs, nextArrival(db), settings.id, sequence, arrivedMs, packed, ownChain];
    if (insert.run(row).changes === 1) fresh.push(scan);
    else if (!isKept(db, settings.sourceId, scan)) refused.push({ timeMs, because: OTHER_FIGURES });
  });
  return { fresh, refused };
}

const INSERT = `INSERT INTO live_scans
  (source_id, time_ms, arrival, settings_id, sequence, arrived_ms, packed, chain) VALUES (?, ?, ?, ?, ?, ?, ?, ?)
  ON CONFLICT DO NOTHING`;

const OTHER_FIGURES = 'other figures are kept for this instant already; the first stay';

function isKept(db: Db, sourceId: number, { timeMs, packed }: ScanToKeep): boolean {
  const kept = db
    .prepare<[number, number], Buffer>('SELECT packed FROM live_scans WHERE source_id = ? AND time_ms = ?')
    .pluck()
    .get(sourceId, timeMs);
  return kept?.equals(packed) === true;
}

function outcomeOf(scans: readonly ScanToKeep[], { fresh, refused }: Inserted): KeptBatch {
  return { fresh, refused, known: scans.length - fresh.length - refused.length };
}

/** The head over scans of which some came late or were known; it is put on the last that came. */
function chainAnew(
  db: Db,
  run: LiveRunRow,
  { sourceId, sha256 }: LiveSettings,
  before: ChainHead,
  fresh: readonly ScanToKeep[],
): ChainHead {
  const firstMs = fresh[0]?.timeMs ?? 0;
  const from = isLater(before, fresh) ? before : rewindChain(before, firstMs);
  const head = extendChain(from, from === before ? fresh : readPackedScans(db, run, sourceId, sha256, from.lastMs));
  db.prepare('UPDATE live_scans SET chain = ? WHERE source_id = ? AND time_ms = ?').run(
    digestOf(head),
    sourceId,
    fresh.at(-1)?.timeMs,
  );
  return head;
}

function isLater({ lastMs }: ChainHead, [first]: readonly ScanToKeep[]): boolean {
  return lastMs === null || (first !== undefined && first.timeMs > lastMs);
}

function isWithin({ begunMs, endedMs }: LiveRunRow, timeMs: number): boolean {
  return timeMs >= begunMs && (endedMs === null || timeMs <= endedMs);
}

function toKeep(scan: LiveScan, { document }: LiveSettings): ScanToKeep {
  if (scan.figures.length !== document.channels.length) {
    throw new Error(`a scan of "${document.name}" has ${scan.figures.length} figures, not ${document.channels.length}`);
  }
  return { ...scan, packed: packScan(scan.figures) };
}

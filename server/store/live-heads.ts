import type { Db } from './database.ts';
import { beginChain, type ChainHead, extendChain, type PackedScan } from './live-chain.ts';
import type { LiveRunRow } from './live-runs.ts';
import { listSettings } from './live-sources.ts';
import { prepared } from './prepared.ts';

/** Heads of one source in one open run, by the hash of the document its scans came by. */
export type Heads = ReadonlyMap<string, ChainHead>;

/**
 * Where each chain of a source stands in an open run, without reading its scans again.
 *
 * Only this connection's writes are followed; where another one wrote, the scans are read again.
 */
export function headsOf(db: Db, run: LiveRunRow, sourceId: number): Heads {
  forgetIfOthersWrote(db);
  return headsSinceLook(db, run, sourceId);
}

/** As {@link headsOf}, in a transaction that has looked already whether others wrote. */
export function headsSinceLook(db: Db, run: LiveRunRow, sourceId: number): Heads {
  const { byKey } = knownHeads(db);
  const key = keyOf(run, sourceId);
  const known = byKey.get(key);
  if (known !== undefined) return known;
  const heads = readHeads(db, run, sourceId);
  byKey.set(key, heads);
  return heads;
}

/** Puts heads in the place of those before them, once what they stand for is committed. */
export function adoptHeads(db: Db, run: LiveRunRow, sourceId: number, heads: Heads): void {
  knownHeads(db).byKey.set(keyOf(run, sourceId), heads);
}

/** Scans of an open run that came by one document, in order of time. */
export function readPackedScans(
  db: Db,
  { begunMs, endedMs }: LiveRunRow,
  sourceId: number,
  documentSha256: string,
  afterMs: number | null = null,
): IterableIterator<PackedScan> {
  return db
    .prepare<object, PackedScan>(
      `SELECT time_ms AS timeMs, packed FROM live_scans
       WHERE source_id = @sourceId AND time_ms BETWEEN @from AND @until AND time_ms > @after
         AND settings_id IN (SELECT id FROM live_source_settings
                             WHERE source_id = @sourceId AND document_sha256 = @documentSha256)
       ORDER BY time_ms`,
    )
    .iterate({
      sourceId,
      documentSha256,
      from: begunMs,
      until: endedMs ?? Number.MAX_VALUE,
      after: afterMs ?? -Number.MAX_VALUE,
    });
}

function readHeads(db: Db, run: LiveRunRow, sourceId: number): Heads {
  const heads = new Map<string, ChainHead>();
  for (const { sha256, document } of listSettings(db, sourceId)) {
    if (heads.has(sha256)) continue;
    heads.set(sha256, extendChain(beginChain(document), readPackedScans(db, run, sourceId, sha256)));
  }
  return heads;
}

interface KnownHeads {
  version: number | undefined;
  readonly byKey: Map<string, Heads>;
}

const knownByDb = new WeakMap<Db, KnownHeads>();

/** Forgets all heads where another connection wrote into the database since the last look. */
export function forgetIfOthersWrote(db: Db): void {
  const row = prepared<[], { data_version: number }>(db, 'PRAGMA data_version').get();
  const known = knownHeads(db);
  if (known.version === row?.data_version) return;
  known.version = row?.data_version;
  known.byKey.clear();
}

function knownHeads(db: Db): KnownHeads {
  const known = knownByDb.get(db) ?? { version: undefined, byKey: new Map<string, Heads>() };
  knownByDb.set(db, known);
  return known;
}

/** A run that ends where it had not is another: its later scans no longer count. */
function keyOf({ run, endedMs }: LiveRunRow, sourceId: number): string {
  return `${run} ${sourceId} ${endedMs}`;
}

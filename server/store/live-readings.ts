import type { LiveScan } from '../../models/log/live-source.ts';
import type { Readings } from '../../models/log/readings.ts';
import { channelsOfSource } from '../../models/log/source-channels.ts';
import type { Db } from './database.ts';
import { beginChain, type ChainHead, digestOf } from './live-chain.ts';
import { headsOf, readPackedScans } from './live-heads.ts';
import type { LiveRunRow } from './live-runs.ts';
import { unpackScan } from './live-scan-bytes.ts';
import { type LiveSettings, type LiveSourceRow, listLiveSources, listSettings } from './live-sources.ts';

/** What one source sent into an open run by one document: a source of the run that is still growing. */
export interface GrowingSource {
  readonly run: LiveRunRow;
  readonly sourceId: number;
  readonly settings: LiveSettings;
  readonly head: ChainHead;
  readonly chainSha256: string;
}

/**
 * The sources of an open run: what those of its vessel sent, and those that have sent nothing yet and do not rest.
 * A source whose document was changed meanwhile is one for each.
 */
export function growingSources(db: Db, run: LiveRunRow): GrowingSource[] {
  return listLiveSources(db, run.vesselId).flatMap((source) => growingOf(db, run, source));
}

function growingOf(db: Db, run: LiveRunRow, { id: sourceId, settings: current }: LiveSourceRow): GrowingSource[] {
  const heads = headsOf(db, run, sourceId);
  // The first settings with a document stands for all with it.
  const byDocument = new Map(
    listSettings(db, sourceId)
      .toReversed()
      .map((one) => [one.sha256, one]),
  );
  return [...byDocument.values()]
    .sort((a, b) => a.id - b.id)
    .map((settings) => ({ settings, head: heads.get(settings.sha256) ?? beginChain(settings.document) }))
    .filter(({ settings, head }) => head.scans > 0 || (settings.sha256 === current.sha256 && !current.isResting))
    .map(({ settings, head }) => ({
      run,
      sourceId,
      settings,
      head,
      chainSha256: digestOf(head).toString('hex'),
    }));
}

/** Readings of an open run's source so far, as {@link readReadings} gives those of a stored one. */
export function readGrowing(db: Db, { run, sourceId, settings, head }: GrowingSource): Readings {
  const channels = channelsOfSource(settings.document);
  const timeMs = new Float64Array(head.scans);
  const columns = channels.map(() => new Float64Array(head.scans));
  let scan = 0;
  for (const row of readPackedScans(db, run, sourceId, settings.sha256)) {
    timeMs[scan] = row.timeMs;
    for (let n = 0; n < columns.length; n += 1) {
      const column = columns[n];
      if (column !== undefined) column[scan] = row.packed.readDoubleLE(n * 8);
    }
    scan += 1;
  }
  return {
    timeMs,
    channels: channels.map((channel, n) => ({ channel, value: columns[n] ?? new Float64Array() })),
  };
}

/** A scan of the rolling store with the settings it came by. */
export interface KeptScan extends LiveScan {
  readonly settingsId: number;
  readonly arrivedMs: number;
}

/** Scans a source sent in [from, until], in order of time, whether or not a run was open; at most so many. */
export function readKeptScans(
  db: Db,
  { sourceId, fromMs, untilMs, atMost = Number.MAX_SAFE_INTEGER }: KeptQuery,
): KeptScan[] {
  return db
    .prepare<object, Omit<KeptScan, 'figures'> & { packed: Buffer }>(
      `SELECT time_ms AS timeMs, sequence, settings_id AS settingsId, arrived_ms AS arrivedMs, packed FROM live_scans
       WHERE source_id = @sourceId AND time_ms BETWEEN @fromMs AND @untilMs ORDER BY time_ms LIMIT @atMost`,
    )
    .all({ sourceId, fromMs, untilMs, atMost })
    .map(({ packed, ...scan }) => ({ ...scan, figures: unpackScan(packed) }));
}

export interface KeptQuery {
  readonly sourceId: number;
  readonly fromMs: number;
  readonly untilMs: number;
  readonly atMost?: number;
}

/** The last scan a source sent, by its instant. */
export function findLastScan(db: Db, sourceId: number): KeptScan | undefined {
  const lastMs = db
    .prepare<[number], number>('SELECT max(time_ms) FROM live_scans WHERE source_id = ?')
    .pluck()
    .get(sourceId);
  if (lastMs === undefined || lastMs === null) return undefined;
  return readKeptScans(db, { sourceId, fromMs: lastMs, untilMs: lastMs })[0];
}

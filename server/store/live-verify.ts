import type { Db } from './database.ts';
import { beginChain, digestOf, extendChain, type PackedScan } from './live-chain.ts';
import { type LiveRunRow, listOpenRuns } from './live-runs.ts';
import { type LiveSettings, listLiveSources, listSettings } from './live-sources.ts';

/** The first source of an open run whose scans no longer have the hash that was written with the last of them. */
export function findBrokenLiveChain(db: Db): string | null {
  for (const run of listOpenRuns(db)) {
    for (const { id, name } of listLiveSources(db, run.vesselId)) {
      if (!holdsLiveChain(db, run, id)) return `run ${run.run}, source "${name}"`;
    }
  }
  return null;
}

/** Whether what a source sent into an open run still has the hashes written with its last scans. */
export function holdsLiveChain(db: Db, run: LiveRunRow, sourceId: number): boolean {
  const seen = new Set<string>();
  return listSettings(db, sourceId).every((settings) => {
    if (seen.has(settings.sha256)) return true;
    seen.add(settings.sha256);
    return holdsByDocument(db, run, settings);
  });
}

interface ChainedScan extends PackedScan {
  readonly arrival: number;
  readonly chain: Buffer | null;
}

function holdsByDocument(db: Db, run: LiveRunRow, { sourceId, sha256, document }: LiveSettings): boolean {
  const scans = db
    .prepare<object, ChainedScan>(
      `SELECT time_ms AS timeMs, packed, arrival, chain FROM live_scans
       WHERE source_id = @sourceId AND time_ms >= @begunMs
         AND settings_id IN (SELECT id FROM live_source_settings
                             WHERE source_id = @sourceId AND document_sha256 = @sha256)
       ORDER BY time_ms`,
    )
    .all({ sourceId, sha256, begunMs: run.begunMs });
  // A hash from before this run was begun is an earlier run's.
  const chained = scans.filter(({ chain, arrival }) => chain !== null && arrival > run.begunArrival);
  if (chained.length === 0) return true;
  const last = chained.reduce((latest, scan) => (scan.arrival > latest.arrival ? scan : latest));
  // Before the run was ended, what came later than its end counted too.
  const untilMs =
    run.endedMs !== null && last.arrival > (run.endedArrival ?? 0) ? run.endedMs : Number.POSITIVE_INFINITY;
  const counted = scans.filter(({ arrival, timeMs }) => arrival <= last.arrival && timeMs <= untilMs);
  return last.chain?.equals(digestOf(extendChain(beginChain(document), counted))) === true;
}

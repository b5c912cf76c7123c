import { DomainError } from '../../models/errors.ts';
import type { Readings } from '../../models/log/readings.ts';
import { appendAudit } from '../store/audit.ts';
import type { Db } from '../store/database.ts';
import { type GrowingSource, growingSources, readGrowing } from '../store/live-readings.ts';
import { type LiveRunRow, markClosed, requireOpenRun } from '../store/live-runs.ts';
import { holdsLiveChain } from '../store/live-verify.ts';
import { readReadings } from '../store/reading-blocks.ts';
import { chainOfReadings } from '../store/reading-chain.ts';
import { refreshSpan, requireRun } from '../store/runs.ts';
import { insertSilentSource } from '../store/silent-sources.ts';
import { insertSource } from '../store/sources.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';

/** A scan that comes while it is judged makes it begin anew; so often. */
const TRIES = 3;

/**
 * Closes a run that has ended: merges its scans into blocks, reads them back and compares, and judges it for good; all
 * of it, or nothing.
 *
 * @returns the evaluation's number, or null where there was nothing to judge by.
 */
export async function closeRun(parts: JudgingParts, run: number): Promise<number | null> {
  requireRun(parts.db, run);
  for (let left = TRIES; ; left -= 1) {
    const { endedMs } = requireOpenRun(parts.db, run);
    if (endedMs === null) throw new DomainError('state-conflict', `Run ${run} is still running; end it first`, { run });
    const before = countScans(parts.db, run);
    try {
      return await changeAndJudge(parts, run, 'run closed', { open: false }, () => mergeScans(parts, run));
    } catch (error) {
      if (left === 1 || countScans(parts.db, run) === before) throw error;
    }
  }
}

function countScans(db: Db, run: number): number {
  return growingSources(db, requireOpenRun(db, run)).reduce((sum, { head }) => sum + head.scans, 0);
}

function mergeScans(parts: ActionParts, run: number): void {
  const { db } = parts;
  const live = requireOpenRun(db, run);
  const deed = deedOf(parts);
  const growing = growingSources(db, live);
  for (const source of growing) refuseDamaged(db, live, source);
  const chains = growing.map((source, place) => mergeSource(db, source, place + 1, deed));
  markClosed(db, run, deed.at);
  refreshSpan(db, run);
  const scans = growing.reduce((sum, { head }) => sum + head.scans, 0);
  const details = { sources: growing.length, scans, readings: chains.join(' ') };
  appendAudit(db, { ...deed, verb: 'close-run', subject: `run/${run}`, details });
}

function refuseDamaged(db: Db, live: LiveRunRow, { sourceId, settings }: GrowingSource): void {
  if (holdsLiveChain(db, live, sourceId)) return;
  const { name } = settings.document;
  throw new DomainError(
    'database-damaged',
    `What "${name}" sent into run ${live.run} no longer has the hash it was kept with; it is not merged`,
    { run: live.run, source: name },
  );
}

function mergeSource(db: Db, source: GrowingSource, n: number, deed: { readonly at: string; readonly by: string }) {
  const { run, settings, head, chainSha256 } = source;
  const { document } = settings;
  if (head.scans === 0) {
    insertSilentSource(db, { run: run.run, n, document, ...deed });
    return chainSha256;
  }
  const readings = readGrowing(db, source);
  const log = { readings, repairs: [], passedOver: [] };
  const sources = { runId: run.run, recorderId: null, replacesId: null, layout: document, log, files: [], ...deed };
  const merged = insertSource(db, sources);
  const readBack = readReadings(db, merged.id, head.scans, document.channels);
  const isSame = merged.n === n && merged.chainSha256 === chainSha256 && chainOfReadings(readBack) === chainSha256;
  if (isSame && equal(readings, readBack)) return chainSha256;
  throw new DomainError(
    'database-damaged',
    `The scans of "${document.name}" read back otherwise than they were merged`,
    {
      run: run.run,
      source: document.name,
    },
  );
}

function equal(a: Readings, b: Readings): boolean {
  const same = (x: Float64Array, y: Float64Array) =>
    x.length === y.length && x.every((figure, n) => Object.is(figure + 0, (y[n] ?? 0) + 0));
  return same(a.timeMs, b.timeMs) && a.channels.every(({ value }, n) => same(value, b.channels[n]?.value ?? value));
}

import { setImmediate as nextTurn } from 'node:timers/promises';
import { DomainError } from '../../models/errors.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { appendAudit } from '../store/audit.ts';
import type { Db } from '../store/database.ts';
import { type GrowingSource, growingSources, readGrowing } from '../store/live-readings.ts';
import { markClosed, requireOpenRun } from '../store/live-runs.ts';
import { holdsLiveChain } from '../store/live-verify.ts';
import { areStored, type Block, holdsReadings, packReadings } from '../store/reading-blocks.ts';
import { refreshSpan, requireRun } from '../store/runs.ts';
import { insertSilentSource } from '../store/silent-sources.ts';
import { insertSource } from '../store/sources.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';

/** A scan that comes meanwhile makes it begin anew; so often. */
const TRIES = 3;

/**
 * Closes a run that has ended: its scans are packed into blocks and compared with what is unpacked from them, a few at
 * a time so that nothing that is logged waits; then the blocks are written, read back and compared and the run is judged
 * for good, all in one transaction. The live rows go later, portion by portion.
 *
 * @returns the evaluation's number, or null where there was nothing to judge by.
 */
export async function closeRun(parts: JudgingParts, run: number): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  for (let left = TRIES; ; left -= 1) {
    const { endedMs } = requireOpenRun(db, run);
    if (endedMs === null) throw new DomainError('state-conflict', `Run ${run} is still running; end it first`, { run });
    const packed = await packSources(db, run);
    try {
      return await changeAndJudge(parts, run, 'run closed', { open: false }, () => mergeSources(parts, run, packed));
    } catch (error) {
      if (left === 1 || areCurrent(db, run, packed)) throw error;
    }
  }
}

/** A source that grew, and its readings as they will be written. */
interface PackedSource {
  readonly growing: GrowingSource;
  readonly log: ReadLog;
  readonly blocks: readonly Block[];
}

async function packSources(db: Db, run: number): Promise<PackedSource[]> {
  const packed: PackedSource[] = [];
  for (const growing of growingSources(db, requireOpenRun(db, run))) {
    refuseDamaged(db, growing);
    await nextTurn();
    const log = { readings: readGrowing(db, growing), repairs: [], passedOver: [] };
    const blocks: Block[] = [];
    for (const block of packReadings(log.readings)) {
      await nextTurn();
      if (!holdsReadings(block, log.readings)) throw readsOtherwise(growing);
      blocks.push(block);
    }
    packed.push({ growing, log, blocks });
  }
  return packed;
}

function areCurrent(db: Db, run: number, packed: readonly PackedSource[]): boolean {
  const now = growingSources(db, requireOpenRun(db, run));
  return (
    now.length === packed.length && now.every(({ chainSha256 }, n) => chainSha256 === packed[n]?.growing.chainSha256)
  );
}

function mergeSources(parts: ActionParts, run: number, packed: readonly PackedSource[]): void {
  const { db } = parts;
  const deed = deedOf(parts);
  if (!areCurrent(db, run, packed)) {
    throw new DomainError('state-conflict', `Run ${run} went on while it was being closed; close it again`, { run });
  }
  packed.forEach((source, place) => {
    mergeSource(db, source, place + 1, deed);
  });
  markClosed(db, run, deed.at);
  refreshSpan(db, run);
  const scans = packed.reduce((sum, { growing }) => sum + growing.head.scans, 0);
  const readings = packed.map(({ growing }) => growing.chainSha256).join(' ');
  const details = { sources: packed.length, scans, readings };
  appendAudit(db, { ...deed, verb: 'close-run', subject: `run/${run}`, details });
}

function mergeSource(
  db: Db,
  { growing, log, blocks }: PackedSource,
  n: number,
  deed: { readonly at: string; readonly by: string },
): void {
  const { run, settings, head, chainSha256 } = growing;
  const { document } = settings;
  if (head.scans === 0) {
    insertSilentSource(db, { run: run.run, n, document, ...deed });
    return;
  }
  const source = { runId: run.run, recorderId: null, replacesId: null, layout: document, log, blocks, files: [] };
  const merged = insertSource(db, { ...source, ...deed });
  const isSame = merged.n === n && merged.chainSha256 === chainSha256 && areStored(db, merged.id, blocks);
  if (!isSame) throw readsOtherwise(growing);
}

function refuseDamaged(db: Db, { run, sourceId, settings }: GrowingSource): void {
  if (holdsLiveChain(db, run, sourceId)) return;
  const { name } = settings.document;
  throw new DomainError(
    'database-damaged',
    `What "${name}" sent into run ${run.run} no longer has the hash it was kept with; it is not merged`,
    { run: run.run, source: name },
  );
}

function readsOtherwise({ run, settings }: GrowingSource): DomainError {
  const { name } = settings.document;
  return new DomainError('database-damaged', `The scans of "${name}" read otherwise in blocks than as they came`, {
    run: run.run,
    source: name,
  });
}

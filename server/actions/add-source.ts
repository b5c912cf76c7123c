import { DomainError } from '../../models/errors.ts';
import { appendAudit } from '../store/audit.ts';
import { sha256OfDocument } from '../store/canonical.ts';
import type { Db } from '../store/database.ts';
import { findOpenRun } from '../store/live-runs.ts';
import { chainOfReadings } from '../store/reading-chain.ts';
import { findRecorder, requireRecorder } from '../store/recorders.ts';
import { requireRun } from '../store/runs.ts';
import { countSourcesOf } from '../store/sources.ts';
import { deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';
import { refuseRecorded } from './receive-file.ts';
import type { NewRecording } from './record-run.ts';
import { readRunLog, type SourceInput, sourceInputs } from './run-inputs.ts';
import { shiftedLog } from './shifted-log.ts';
import { readFiles, writeNewSource } from './write-source.ts';

/** A recording that is joined: its channels are those of the run, and fill what was not read. */
export interface Join {
  /** Added to its instants when it is read; the file keeps its own. */
  readonly shiftMs: number;
  /** Why it may be taken for the same instrument's, and its clock for so much off. */
  readonly because: string;
}

/**
 * Adds what another recorder wrote during a run, its channels beside those there are or joined to them, and judges the
 * run by all.
 */
export async function addSource(
  parts: JudgingParts,
  run: number,
  recording: NewRecording,
  join: Join | null = null,
): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  refuseOpenRun(db, run);
  for (const file of recording.files) refuseRecorded(parts, file);
  const read = await readFiles(recording.files, recording.layout);
  const before = sourceInputs(db, run);
  const shiftMs = join?.shiftMs ?? 0;
  const { recorder } = recording;
  const isKnown = recorder != null && findRecorder(db, recorder) !== undefined;
  const added: SourceInput = {
    n: 1 + countSourcesOf(db, run),
    recorderId: isKnown ? requireRecorder(db, recorder).id : null,
    layout: read.layout,
    shiftMs,
    fills: join !== null,
    scans: read.log.readings.timeMs.length,
    chainSha256: chainOfReadings(read.log.readings),
    layoutSha256: sha256OfDocument(read.layout),
    fileSha256s: read.files.map(({ sha256 }) => sha256),
    fromMs: Math.trunc((read.log.readings.timeMs[0] ?? 0) + shiftMs),
    untilMs: Math.trunc((read.log.readings.timeMs.at(-1) ?? 0) + shiftMs),
    readLog: () => shiftedLog(read.log, shiftMs),
  };
  const sources = [...before, added];
  // Whether or not there is a load to judge it by: channels of one name are refused now.
  readRunLog(sources);
  return changeAndJudge(parts, run, 'readings added', { sources }, () => {
    const details = writeNewSource(parts, run, read, recording, join);
    appendAudit(db, {
      ...deedOf(parts),
      verb: join === null ? 'add-source' : 'join-source',
      subject: `run/${run}`,
      why: join?.because ?? null,
      details: join === null ? details : { ...details, shiftS: shiftMs / 1000 },
    });
  });
}

/** The numbers of sources that still grow are not settled yet. */
function refuseOpenRun(db: Db, run: number): void {
  if (findOpenRun(db, run) === undefined) return;
  throw new DomainError('state-conflict', `Run ${run} is still open; end and close it before a file is added to it`, {
    run,
  });
}

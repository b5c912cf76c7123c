import { appendAudit } from '../store/audit.ts';
import { sha256OfDocument } from '../store/canonical.ts';
import { chainOfReadings } from '../store/reading-chain.ts';
import { requireRun } from '../store/runs.ts';
import { deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';
import { refuseRecorded } from './receive-file.ts';
import type { NewRecording } from './record-run.ts';
import { readRunLog, sourceInputs } from './run-inputs.ts';
import { readFiles, writeNewSource } from './write-source.ts';

/** Adds what another recorder wrote during a run, its channels beside those there are, and judges the run by all. */
export async function addSource(parts: JudgingParts, run: number, recording: NewRecording): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  for (const file of recording.files) refuseRecorded(parts, file);
  const read = await readFiles(recording.files, recording.layout);
  const added = {
    chainSha256: chainOfReadings(read.log.readings),
    layoutSha256: sha256OfDocument(read.layout),
    fileSha256s: read.files.map(({ sha256 }) => sha256),
    untilMs: Math.trunc(read.log.readings.timeMs.at(-1) ?? 0),
    readLog: () => read.log,
  };
  const sources = [...sourceInputs(db, run), added];
  // Whether or not there is a load to judge it by: channels of one name are refused now.
  readRunLog(sources);
  return changeAndJudge(parts, run, 'readings added', { sources }, () => {
    const details = writeNewSource(parts, run, read, recording);
    appendAudit(db, { ...deedOf(parts), verb: 'add-source', subject: `run/${run}`, details });
  });
}

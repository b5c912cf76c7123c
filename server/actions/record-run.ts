import type { Layout } from '../../models/log/layout.ts';
import { appendAudit } from '../store/audit.ts';
import { findRecorder, requireRecorder } from '../store/recorders.ts';
import { insertRun } from '../store/runs.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import type { IncomingFile } from './incoming-file.ts';
import { refuseRecorded } from './receive-file.ts';
import { type Origin, type ReadFiles, readFiles, writeNewSource } from './write-source.ts';

export interface NewRecording extends Origin {
  /** One file, or several pieces of the same log. */
  readonly files: readonly IncomingFile[];
  readonly layout: Layout;
}

/** Reads files by a layout and makes a run of them, whole or not at all. Returns the run. */
export async function recordRun(parts: ActionParts, recording: NewRecording): Promise<number> {
  for (const file of recording.files) refuseRecorded(parts, file);
  const read = await readFiles(recording.files, recording.layout);
  return parts.db.transaction(() => writeRun(parts, read, recording)).immediate();
}

function writeRun(parts: ActionParts, read: ReadFiles, origin: Origin): number {
  const { db } = parts;
  const deed = deedOf(parts);
  const { timeMs } = read.log.readings;
  const run = insertRun(db, {
    vesselId: vesselOf(parts, origin),
    fromMs: timeMs[0] ?? 0,
    untilMs: timeMs.at(-1) ?? 0,
    ...deed,
  });
  const details = { ...writeNewSource(parts, run, read, origin), vessel: origin.vessel ?? null };
  appendAudit(db, { ...deed, verb: 'record-run', subject: `run/${run}`, details });
  return run;
}

/** The vessel that was named; where none was, the recorder's. */
function vesselOf({ db }: ActionParts, { vessel, recorder }: Origin): number | null {
  if (vessel != null) return requireVessel(db, vessel);
  const isKnown = recorder != null && findRecorder(db, recorder) !== undefined;
  return isKnown ? requireRecorder(db, recorder).vesselId : null;
}

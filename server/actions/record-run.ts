import { DomainError } from '../../models/errors.ts';
import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { appendAudit } from '../store/audit.ts';
import { keepFile } from '../store/files.ts';
import { markImportRecorded, requireImport } from '../store/imports.ts';
import { findRecorder, requireRecorder } from '../store/recorders.ts';
import { insertRun, refreshSpan, requireRun } from '../store/runs.ts';
import { insertSource, readSourceLog, readSources } from '../store/sources.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { addRecorder } from './add-recorder.ts';
import type { IncomingFile } from './incoming-file.ts';
import { keepLayout } from './keep-layout.ts';
import { logFileOf } from './log-file-of.ts';
import { mergeLogs } from './merge-logs.ts';
import { refuseRecorded } from './receive-file.ts';

export interface NewRecording {
  /** One file, or several pieces of the same log. */
  readonly files: readonly IncomingFile[];
  readonly layout: Layout;
  /** Recorder the files came from; made where it is new, and the layout kept for it. */
  readonly recorder?: string | null | undefined;
  readonly vessel?: string | null | undefined;
  /** A run these files are another source of; absent: a new run. */
  readonly run?: number | null | undefined;
  /** The import the file waited as. */
  readonly importId?: number;
}

/** Reads files by a layout and records them, whole or not at all. Returns the run. */
export async function recordRun(parts: ActionParts, recording: NewRecording): Promise<number> {
  for (const file of recording.files) refuseRecorded(parts, file);
  const layout = parseLayout(recording.layout);
  const log = readLog(await Promise.all(recording.files.map(logFileOf)), layout);
  return parts.db.transaction(() => writeRecording(parts, { ...recording, layout }, log)).immediate();
}

function writeRecording(parts: ActionParts, recording: NewRecording, log: ReadLog): number {
  const { db } = parts;
  const { files, layout } = recording;
  for (const file of files) refuseRecorded(parts, file);
  const recorder = recording.recorder ?? null;
  if (recorder !== null) keepForRecorder(parts, recorder, recording);
  const known = recorder === null ? null : requireRecorder(db, recorder);
  const vesselId = recording.vessel == null ? (known?.vesselId ?? null) : requireVessel(db, recording.vessel);
  const deed = deedOf(parts);
  const { timeMs } = log.readings;
  const run =
    recording.run ?? insertRun(db, { vesselId, fromMs: timeMs[0] ?? 0, untilMs: timeMs.at(-1) ?? 0, ...deed });
  if (recording.run != null) refuseClash(parts, run, log);
  const source = insertSource(db, {
    runId: run,
    recorderId: known?.id ?? null,
    replacesId: null,
    layout,
    log,
    files: files.map((file) => ({ name: file.name, fileId: keepFile(db, file) })),
    ...deed,
  });
  refreshSpan(db, run);
  if (recording.importId !== undefined) settleImport(parts, recording.importId, run);
  appendAudit(db, {
    ...deed,
    verb: recording.run == null ? 'record-run' : 'add-source',
    subject: `run/${run}`,
    details: {
      source: source.n,
      readings: source.chainSha256,
      scans: timeMs.length,
      files: files.map(({ sha256 }) => sha256).join(' '),
      recorder,
      vessel: recording.vessel ?? null,
    },
  });
  return run;
}

function keepForRecorder(parts: ActionParts, recorder: string, { vessel, layout }: NewRecording): void {
  if (findRecorder(parts.db, recorder) === undefined) addRecorder(parts, { name: recorder, vessel, layout });
  else keepLayout(parts, recorder, layout);
}

/** Another source must fit beside those the run has. */
function refuseClash({ db }: ActionParts, run: number, log: ReadLog): void {
  requireRun(db, run);
  mergeLogs([...readSources(db, run).map((source) => readSourceLog(db, source)), log]);
}

function settleImport({ db }: ActionParts, id: number, run: number): void {
  const { state } = requireImport(db, id);
  if (state !== 'waiting') {
    throw new DomainError('state-conflict', `Import ${id} is ${state} already`, { import: id, state });
  }
  markImportRecorded(db, id, run);
}

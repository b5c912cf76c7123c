import { DomainError } from '../../models/errors.ts';
import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { keepFile } from '../store/files.ts';
import { markImportRecorded, requireImport } from '../store/imports.ts';
import { findRecorder, requireRecorder } from '../store/recorders.ts';
import { refreshSpan } from '../store/runs.ts';
import { insertSource, type NewSource } from '../store/sources.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { addRecorder } from './add-recorder.ts';
import type { IncomingFile } from './incoming-file.ts';
import { keepLayout } from './keep-layout.ts';
import { logFileOf } from './log-file-of.ts';
import { refuseRecorded } from './receive-file.ts';

/** Files of one recorder and what they say. */
export interface ReadFiles {
  /** One file, or several pieces of the same log. */
  readonly files: readonly IncomingFile[];
  readonly layout: Layout;
  readonly log: ReadLog;
}

/** Reads files by a layout; nothing is written. */
export async function readFiles(files: readonly IncomingFile[], document: Layout): Promise<ReadFiles> {
  const layout = parseLayout(document);
  return { files, layout, log: readLog(await Promise.all(files.map(logFileOf)), layout) };
}

/** Where files of a run came from. */
export interface Origin {
  /** Recorder the files came from; made where it is new, and the layout kept for it. */
  readonly recorder?: string | null | undefined;
  /** Vessel of a recorder that is new. */
  readonly vessel?: string | null | undefined;
  /** The import the file waited as. */
  readonly importId?: number | undefined;
}

/** Writes files and their readings as a source of a run; part of a larger write. Says what the audit line should. */
export function writeNewSource(
  parts: ActionParts,
  run: number,
  read: ReadFiles,
  origin: Origin,
  join: NewSource['join'] = null,
) {
  const { db } = parts;
  for (const file of read.files) refuseRecorded(parts, file);
  const recorder = origin.recorder ?? null;
  if (recorder !== null) keepForRecorder(parts, recorder, read.layout, origin.vessel);
  const files = read.files.map((file) => ({ name: file.name, fileId: keepFile(db, file) }));
  const recorderId = recorder === null ? null : requireRecorder(db, recorder).id;
  const source = insertSource(db, { runId: run, recorderId, replacesId: null, ...read, files, join, ...deedOf(parts) });
  refreshSpan(db, run);
  if (origin.importId !== undefined) settleImport(parts, origin.importId, run);
  return {
    source: source.n,
    readings: source.chainSha256,
    scans: read.log.readings.timeMs.length,
    files: read.files.map(({ sha256 }) => sha256).join(' '),
    recorder,
  };
}

function keepForRecorder(
  parts: ActionParts,
  recorder: string,
  layout: Layout,
  vessel: string | null | undefined,
): void {
  if (findRecorder(parts.db, recorder) === undefined) addRecorder(parts, { name: recorder, vessel, layout });
  else keepLayout(parts, recorder, layout);
}

function settleImport({ db }: ActionParts, id: number, run: number): void {
  const { state } = requireImport(db, id);
  if (state !== 'waiting') {
    throw new DomainError('state-conflict', `Import ${id} is ${state} already`, { import: id, state });
  }
  markImportRecorded(db, id, run);
}

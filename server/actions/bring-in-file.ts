import { createHash } from 'node:crypto';
import { DomainError } from '../../models/errors.ts';
import { readHead } from '../../models/log/proposal/read-head.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { ImportLine } from '../contract/imports.ts';
import type { Recorder } from '../contract/recorders.ts';
import { findRecorder, listRecorders } from '../store/recorders.ts';
import { findRecordedByName } from '../store/runs.ts';
import type { ActionParts } from './action-parts.ts';
import { headOf } from './head-of.ts';
import type { IncomingFile } from './incoming-file.ts';
import { logFileOf } from './log-file-of.ts';
import { receiveFile, refuseRecorded } from './receive-file.ts';
import { recordRun } from './record-run.ts';

/** What became of a file: a run that awaits its load, or an import that waits for someone. */
export type Arrival = { readonly run: number } | { readonly importId: number; readonly refusal: DomainError };

export interface ComingFile {
  readonly file: IncomingFile;
  readonly origin: ImportLine['origin'];
  /** Recorder it came from, where that is known. */
  readonly recorder: string | null;
  /** Most bytes a file may have to be kept. */
  readonly mostBytes: number;
}

/**
 * Makes a run of a file by the layout its recorder has kept. Where the recorder is not known, the one stored layout
 * that reads the file is taken; none or several: the file waits for someone.
 */
export async function bringInFile(parts: ActionParts, coming: ComingFile): Promise<Arrival> {
  const { file, origin, recorder } = coming;
  refuseRecorded(parts, file);
  try {
    refuseTooLarge(coming);
    refuseGrown(parts, file);
    // Rubbish is told from a log of an unknown layout before any layout is tried on it.
    readHead(await headOf(file));
    const from = recorder === null ? await recognise(parts, file) : requireLayout(parts, recorder);
    return { run: await recordRun(parts, { files: [file], layout: from.layout.document, recorder: from.name }) };
  } catch (error) {
    if (!(error instanceof DomainError) || error.code === 'already-recorded') throw error;
    const known = recorder !== null && findRecorder(parts.db, recorder) !== undefined;
    const importId = receiveFile(parts, { file, origin, recorder: known ? recorder : null, refusal: error });
    return { importId, refusal: error };
  }
}

function refuseTooLarge({ file, mostBytes }: ComingFile): void {
  if (file.bytes <= mostBytes) return;
  throw new DomainError('too-large', `${file.name} has ${file.bytes} bytes; at most ${mostBytes} are taken`, {
    file: file.name,
    bytes: file.bytes,
  });
}

/** A file that goes on where a recorded one of the same name ended: the recorder had only paused. */
function refuseGrown({ db }: ActionParts, file: IncomingFile): void {
  for (const { run, bytes, sha256 } of findRecordedByName(db, file.name)) {
    if (bytes >= file.bytes || hashOfStart(file, bytes) !== sha256) continue;
    throw new DomainError(
      'state-conflict',
      `${file.name} went on growing after it was recorded as run ${run}; someone has to say what it is`,
      { file: file.name, run },
    );
  }
}

function hashOfStart({ chunks }: IncomingFile, bytes: number): string {
  const hash = createHash('sha256');
  let left = bytes;
  for (const chunk of chunks()) {
    hash.update(chunk.subarray(0, left));
    left -= Math.min(left, chunk.length);
    if (left === 0) break;
  }
  return hash.digest('hex');
}

type WithLayout = Recorder & { readonly layout: NonNullable<Recorder['layout']> };

function hasLayout(recorder: Recorder): recorder is WithLayout {
  return recorder.layout !== null;
}

function requireLayout({ db }: ActionParts, name: string): WithLayout {
  const recorder = findRecorder(db, name);
  if (recorder !== undefined && hasLayout(recorder)) return recorder;
  throw new DomainError('layout-not-provable', `No layout is kept for a recorder called "${name}" yet`, {
    recorder: name,
  });
}

async function recognise({ db }: ActionParts, file: IncomingFile): Promise<WithLayout> {
  const reading: WithLayout[] = [];
  for (const recorder of listRecorders(db).filter(hasLayout)) {
    if (await isReadBy(file, recorder)) reading.push(recorder);
  }
  const [only] = reading;
  if (only !== undefined && reading.length === 1) return only;
  throw new DomainError(
    'layout-not-provable',
    reading.length === 0
      ? `${file.name}: no kept layout reads this file; someone has to say how it is to be read`
      : `${file.name}: the layouts of ${reading.map(({ name }) => name).join(' and ')} both read it; someone has to say which`,
    { file: file.name },
  );
}

async function isReadBy(file: IncomingFile, { layout }: WithLayout): Promise<boolean> {
  try {
    readLog([await logFileOf(file)], layout.document);
    return true;
  } catch (error) {
    if (error instanceof DomainError) return false;
    throw error;
  }
}

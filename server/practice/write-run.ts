import { createHash } from 'node:crypto';
import { addNote } from '../actions/add-note.ts';
import type { IncomingFile } from '../actions/incoming-file.ts';
import type { JudgingParts } from '../actions/judge-run.ts';
import { recordRun } from '../actions/record-run.ts';
import { setLoad } from '../actions/set-load.ts';
import type { Particulars } from '../contract/runs.ts';
import { KINDS } from './plan-kinds.ts';
import type { PlannedPart, PlannedRun } from './plan-run.ts';
import type { SimulatedRun } from './simulator/simulate-run.ts';
import type { LogFileBytes } from './simulator/write-log.ts';

/** Brings in the files of a run as its recorder left them. Returns its number. */
export function writeRecording(parts: JudgingParts, planned: PlannedRun, run: SimulatedRun, recorder: string) {
  return recordRun(parts, {
    files: run.files.map(incoming),
    layout: run.layout,
    recorder,
    vessel: planned.vessel,
  });
}

/** Says what lay in the vessel; the run is judged by it. */
export async function writeLoad(parts: JudgingParts, n: number, planned: PlannedRun, run: SimulatedRun): Promise<void> {
  const { code, issue } = run.cycle;
  await setLoad(parts, n, { load: run.load, cycle: { code, issue }, particulars: planned.parts.map(particularsOf) });
  addNote(parts, n, { at: planned.startsAt, text: `Loaded by ${planned.operator}.` });
}

export function incoming({ name, bytes }: LogFileBytes): IncomingFile {
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  return { name, sha256, bytes: bytes.length, chunks: () => [bytes] };
}

function particularsOf({ part, kind, tool }: PlannedPart): Particulars {
  const { title, drawing, drawingIssue } = KINDS[kind];
  return { part, title, drawing, drawingIssue, ...(tool === undefined ? {} : { tool }) };
}

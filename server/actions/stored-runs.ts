import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { evaluateLog, type JudgementInputs } from '../../models/evaluation/judge.ts';
import { readDatabase } from '../store/database.ts';
import type { MergedLog } from './merge-logs.ts';
import { readRunSources, sourceInputs } from './run-inputs.ts';

/** A run as it is stored, for a thread that reads the database for itself. */
export interface StoredRun {
  /** Of the database. */
  readonly path: string;
  readonly run: number;
}

/** Work on stored runs that are long, done in a thread: what else there is to do does not wait for their readings. */
export interface StoredRuns {
  readonly evaluate: (run: number, inputs: JudgementInputs) => Promise<Evaluation>;
  readonly read: (run: number) => Promise<MergedLog>;
}

/** Judges a run by the sources that are stored of it. */
export function evaluateStored(stored: StoredRun, inputs: JudgementInputs): Evaluation {
  return evaluateLog(readStored(stored).log, inputs);
}

/** All readings of a run, and what was joined in them. */
export function readStored({ path, run }: StoredRun): MergedLog {
  return readDatabase(path, '', (db) => readRunSources(sourceInputs(db, run)));
}

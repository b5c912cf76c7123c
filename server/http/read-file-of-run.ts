import { DomainError } from '../../models/errors.ts';
import type { Db } from '../store/database.ts';
import { fileChunks, findFile } from '../store/files.ts';
import { requireRun } from '../store/runs.ts';
import { readSources } from '../store/sources.ts';
import type { Download } from './handler.ts';

/** The n-th file of a run, byte for byte as it came. */
export function readFileOfRun(db: Db, run: number, n: number): Download {
  requireRun(db, run);
  const file = readSources(db, run)
    .flatMap(({ files }) => files)
    .find((one) => one.n === n);
  const kept = file === undefined ? undefined : findFile(db, file.sha256);
  if (file === undefined || kept === undefined) {
    throw new DomainError('not-found', `Run ${run} has no file ${n}`, { run, file: n });
  }
  return { name: file.name, chunks: fileChunks(db, kept.id) };
}

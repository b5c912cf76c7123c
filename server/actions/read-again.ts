import { DomainError } from '../../models/errors.ts';
import type { Layout } from '../../models/log/layout.ts';
import { appendAudit } from '../store/audit.ts';
import { sha256OfDocument } from '../store/canonical.ts';
import { fileChunks, findFile } from '../store/files.ts';
import { chainOfReadings } from '../store/reading-chain.ts';
import { refreshSpan, requireRun } from '../store/runs.ts';
import { insertSource, readSources } from '../store/sources.ts';
import { deedOf } from './action-parts.ts';
import type { IncomingFile } from './incoming-file.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';
import { readRunLog, type SourceInput, sourceInputs } from './run-inputs.ts';
import { shiftedLog } from './shifted-log.ts';
import { readFiles } from './write-source.ts';

/**
 * Reads the kept files of a source again by another layout, and judges the run by what they say then.
 *
 * What was read first stays as it was recorded, and so does every judgement that was made of it.
 */
export async function readAgain(
  parts: JudgingParts,
  run: number,
  n: number,
  { layout: document, reason }: { readonly layout: Layout; readonly reason: string },
): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  const source = readSources(db, run).find((one) => one.n === n);
  if (source === undefined) {
    throw new DomainError('not-found', `Run ${run} has no source ${n} that counts now`, { run, source: n });
  }
  if (source.layout.format === 'dwellbook-source/1') {
    throw new DomainError(
      'state-conflict',
      `Source ${n} of run ${run}, "${source.layout.name}", was logged as it happened; there is no file to read again`,
      { run, source: n },
    );
  }
  const kept = source.files.map(({ sha256, name, bytes }) => {
    const file = findFile(db, sha256);
    if (file === undefined) throw new DomainError('database-damaged', `The file ${sha256} is not there`, { sha256 });
    const { id } = file;
    return { id, file: { name, sha256, bytes, chunks: () => fileChunks(db, id) } satisfies IncomingFile };
  });
  const { layout, log } = await readFiles(
    kept.map(({ file }) => file),
    document,
  );
  const { shiftMs, fills } = source;
  const again: SourceInput = {
    n,
    recorderId: source.recorderId,
    layout,
    shiftMs,
    fills,
    scans: log.readings.timeMs.length,
    chainSha256: chainOfReadings(log.readings),
    layoutSha256: sha256OfDocument(layout),
    fileSha256s: source.files.map(({ sha256 }) => sha256),
    fromMs: Math.trunc((log.readings.timeMs[0] ?? 0) + shiftMs),
    untilMs: Math.trunc((log.readings.timeMs.at(-1) ?? 0) + shiftMs),
    readLog: () => shiftedLog(log, shiftMs),
  };
  const others = sourceInputs(db, run).filter(({ n: other }) => other !== n);
  const sources = [...others, again];
  readRunLog(sources);
  return changeAndJudge(parts, run, 'read again by another layout', { sources }, () => {
    const deed = deedOf(parts);
    const { n: newN } = insertSource(db, {
      runId: run,
      recorderId: source.recorderId,
      replacesId: source.id,
      layout,
      log,
      files: kept.map(({ id, file }) => ({ name: file.name, fileId: id })),
      join: source.joined === null ? null : { shiftMs, because: source.joined.because },
      ...deed,
    });
    refreshSpan(db, run);
    appendAudit(db, {
      ...deed,
      verb: 'read-again',
      subject: `run/${run}`,
      why: reason,
      details: { source: newN, replaces: n, layout: again.layoutSha256, readings: again.chainSha256 },
    });
  });
}

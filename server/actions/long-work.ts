import type { CureOfPart } from '../../models/chart/chart-inputs.ts';
import type { ThroughPart } from '../../models/cure/heat/through-part.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { Readings } from '../../models/log/readings.ts';
import type { Compared, Overlaid } from '../contract/comparison.ts';
import type { CureThroughPart } from './ask-thickness.ts';
import type { CompareParts } from './compare-parts.ts';
import type { EstimateCure, EvaluateLog } from './evaluate-log.ts';
import type { MergedLog } from './merge-logs.ts';
import type { OverlayParts } from './overlay-parts.ts';
import type { StoredRuns } from './stored-runs.ts';
import { startThread } from './thread.ts';

/** Failed parts against sound ones. */
export interface TraceWork {
  readonly compare: CompareParts;
  readonly overlay: OverlayParts;
}

export interface LongWork {
  readonly evaluate: EvaluateLog;
  /** Always in the thread: for many runs one after another. */
  readonly evaluateAside: EvaluateLog;
  readonly estimateCure: EstimateCure;
  /** Always in the thread: it takes a tenth of a second and more, however small the log. */
  readonly cureThroughPart: CureThroughPart;
  /** Always in the thread, which reads the database for itself. */
  readonly trace: TraceWork;
  /** Stored runs of a database, read in the thread. */
  readonly storedRuns: (path: string) => StoredRuns;
  readonly close: () => Promise<void>;
}

/** Up to here the work takes a few ms, less than handing the readings to another thread. */
const READINGS_DONE_HERE = 50_000;

/** Judges and estimates small logs at once, big ones in a thread of their own, so that nothing else waits for them. */
export function createLongWork({ doneHere = READINGS_DONE_HERE } = {}): LongWork {
  const thread = startThread();
  return {
    async evaluate(log, inputs) {
      if (countReadings(log.readings) > doneHere) return thread.ask<Evaluation>('evaluateLog', [log, inputs]);
      const { evaluateLog } = await import('../../models/evaluation/judge.ts');
      return evaluateLog(log, inputs);
    },
    evaluateAside: (log, inputs) => thread.ask<Evaluation>('evaluateLog', [log, inputs]),
    async estimateCure(...given) {
      if (countReadings(given[0]) > doneHere) return thread.ask<CureOfPart>('cureCourses', given);
      const { cureCourses } = await import('./cure-courses.ts');
      return cureCourses(...given);
    },
    cureThroughPart: (asked) => thread.ask<readonly ThroughPart[]>('throughPart', [asked]),
    trace: {
      compare: (asked) => thread.ask<Compared>('compareParts', [asked]),
      overlay: (asked) => thread.ask<Overlaid>('overlayParts', [asked]),
    },
    storedRuns: (path) => ({
      evaluate: (run, inputs) => thread.ask<Evaluation>('evaluateStored', [{ path, run }, inputs]),
      read: (run) => thread.ask<MergedLog>('readStored', [{ path, run }]),
    }),
    close: thread.close,
  };
}

function countReadings({ timeMs, channels }: Readings): number {
  return timeMs.length * channels.length;
}

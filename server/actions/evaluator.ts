import { Worker } from 'node:worker_threads';
import { DomainError } from '../../models/errors.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import type { EvaluateLog } from './evaluate-log.ts';
import type { EvaluateAnswer } from './evaluate-worker.ts';

export interface Evaluator {
  readonly evaluate: EvaluateLog;
  readonly close: () => Promise<void>;
}

/** Up to here judging takes a few ms, less than handing the readings to another thread. */
const READINGS_JUDGED_HERE = 50_000;

interface Waiting {
  readonly resolve: (evaluation: Evaluation) => void;
  readonly reject: (error: Error) => void;
}

/** Judges small logs at once and big ones in a thread of their own, so that nothing else waits for them. */
export function createEvaluator({ judgedHere = READINGS_JUDGED_HERE } = {}): Evaluator {
  const waiting = new Map<number, Waiting>();
  let worker: Worker | null = null;
  let asked = 0;
  const failAll = (error: Error) => {
    worker = null;
    for (const { reject } of waiting.values()) reject(error);
    waiting.clear();
  };
  const startWorker = () => {
    const started = new Worker(new URL('./evaluate-worker.js', import.meta.url));
    started.unref();
    started.on('message', (answer: EvaluateAnswer) => {
      settle(waiting.get(answer.id), answer);
      waiting.delete(answer.id);
      if (waiting.size === 0) started.unref();
    });
    started.on('error', failAll);
    return started;
  };
  return {
    async evaluate(log, inputs) {
      if (countReadings(log) <= judgedHere) {
        const { evaluateLog } = await import('../../models/evaluation/judge.ts');
        return evaluateLog(log, inputs);
      }
      worker ??= startWorker();
      asked += 1;
      const question = { id: asked, log, inputs };
      return new Promise((resolve, reject) => {
        waiting.set(question.id, { resolve, reject });
        worker?.ref();
        worker?.postMessage(question);
      });
    },
    async close() {
      await worker?.terminate();
      failAll(new Error('The server was stopped while a run was being judged'));
    },
  };
}

function settle(who: Waiting | undefined, answer: EvaluateAnswer): void {
  if ('evaluation' in answer) who?.resolve(answer.evaluation);
  else if ('refusal' in answer) {
    const { code, message, facts } = answer.refusal;
    who?.reject(new DomainError(code, message, facts));
  } else who?.reject(new Error(answer.fault));
}

function countReadings({ readings }: ReadLog): number {
  return readings.timeMs.length * readings.channels.length;
}

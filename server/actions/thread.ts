import { Worker } from 'node:worker_threads';
import { DomainError } from '../../models/errors.ts';
import type { Answer, Question } from './thread-worker.ts';

interface Waiting {
  readonly resolve: (result: never) => void;
  readonly reject: (error: Error) => void;
}

export interface Thread {
  readonly ask: <T>(work: Question['work'], given: readonly unknown[]) => Promise<T>;
  readonly close: () => Promise<void>;
}

/** A thread that does one piece of work after another. It is started by the first and keeps no program alive. */
export function startThread(): Thread {
  const waiting = new Map<number, Waiting>();
  let worker: Worker | null = null;
  let asked = 0;
  const failAll = (error: Error) => {
    worker = null;
    for (const { reject } of waiting.values()) reject(error);
    waiting.clear();
  };
  const start = () => {
    const started = new Worker(new URL('./thread-worker.js', import.meta.url));
    started.unref();
    started.on('message', (answer: Answer) => {
      settle(waiting.get(answer.id), answer);
      waiting.delete(answer.id);
      if (waiting.size === 0) started.unref();
    });
    started.on('error', failAll);
    return started;
  };
  return {
    ask(work, given) {
      worker ??= start();
      const asking = worker;
      asked += 1;
      const question: Question = { id: asked, work, given };
      return new Promise((resolve, reject) => {
        waiting.set(question.id, { resolve, reject });
        asking.ref();
        asking.postMessage(question);
      });
    },
    async close() {
      await worker?.terminate();
      failAll(new Error('The server was stopped while this was being worked out'));
    },
  };
}

function settle(who: Waiting | undefined, answer: Answer): void {
  if ('result' in answer) who?.resolve(answer.result as never);
  else if ('refusal' in answer) {
    const { code, message, facts } = answer.refusal;
    who?.reject(new DomainError(code, message, facts));
  } else who?.reject(new Error(answer.fault));
}

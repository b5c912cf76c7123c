import { parentPort } from 'node:worker_threads';
import { DomainError, type ErrorCode, type Facts } from '../../models/errors.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { evaluateLog, type JudgementInputs } from '../../models/evaluation/judge.ts';
import type { ReadLog } from '../../models/log/readings.ts';

export interface EvaluateQuestion {
  readonly id: number;
  readonly log: ReadLog;
  readonly inputs: JudgementInputs;
}

/** A refusal loses its class on the way between threads, so it travels as what it says. */
export type EvaluateAnswer =
  | { readonly id: number; readonly evaluation: Evaluation }
  | {
      readonly id: number;
      readonly refusal: { readonly code: ErrorCode; readonly message: string; readonly facts: Facts };
    }
  | { readonly id: number; readonly fault: string };

parentPort?.on('message', (question: EvaluateQuestion) => {
  parentPort?.postMessage(answer(question));
});

function answer({ id, log, inputs }: EvaluateQuestion): EvaluateAnswer {
  try {
    return { id, evaluation: evaluateLog(log, inputs) };
  } catch (error) {
    if (error instanceof DomainError) {
      return { id, refusal: { code: error.code, message: error.message, facts: error.facts } };
    }
    return { id, fault: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}

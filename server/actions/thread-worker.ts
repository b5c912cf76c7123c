import { parentPort } from 'node:worker_threads';
import { throughPart } from '../../models/cure/heat/through-part.ts';
import { DomainError, type ErrorCode, type Facts } from '../../models/errors.ts';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { compareParts } from './compare-parts.ts';
import { cureCourses } from './cure-courses.ts';
import { overlayParts } from './overlay-parts.ts';
import { evaluateStored, readStored } from './stored-runs.ts';

/** What a thread can be asked to do; its arguments are plain data. */
export const LONG_WORK = {
  evaluateLog,
  cureCourses,
  throughPart,
  compareParts,
  overlayParts,
  evaluateStored,
  readStored,
} as const;

export interface Question {
  readonly id: number;
  readonly work: keyof typeof LONG_WORK;
  readonly given: readonly unknown[];
}

/** A refusal loses its class on the way between threads, so it travels as what it says. */
export type Answer =
  | { readonly id: number; readonly result: unknown }
  | {
      readonly id: number;
      readonly refusal: { readonly code: ErrorCode; readonly message: string; readonly facts: Facts };
    }
  | { readonly id: number; readonly fault: string };

parentPort?.on('message', (question: Question) => {
  parentPort?.postMessage(answer(question));
});

function answer({ id, work, given }: Question): Answer {
  try {
    const does = LONG_WORK[work] as (...given: readonly unknown[]) => unknown;
    return { id, result: does(...given) };
  } catch (error) {
    if (error instanceof DomainError) {
      return { id, refusal: { code: error.code, message: error.message, facts: error.facts } };
    }
    return { id, fault: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}

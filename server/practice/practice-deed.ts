import type { JudgingParts } from '../actions/judge-run.ts';

/** Something one person does at one instant of the workshop's year. */
export interface PracticeDeed {
  readonly atMs: number;
  readonly by: string;
  readonly does: (parts: JudgingParts) => unknown;
}

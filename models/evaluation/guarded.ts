import type { Outcome } from './evaluation.ts';
import { worst } from './finding.ts';

/**
 * A limit decided with its guard band: met where it is met with the limit moved inwards by U, not met where it is not
 * met with the limit moved outwards by U, and between the two nobody can tell.
 *
 * `decide` judges with the limit moved by so many U, inwards where positive. At −1 a reading that lies outside by
 * exactly U is outside.
 * Source: ISO 14253-1, JCGM 106 (guarded acceptance and guarded rejection).
 */
export function guarded(isGuarded: boolean, decide: (shift: -1 | 0 | 1) => Outcome): Outcome {
  const asWritten = decide(0);
  if (!isGuarded) return asWritten;
  const inside = decide(1);
  // What a gap leaves open as written stays open: another band may look at another stretch.
  if (inside !== 'not-met') return asWritten === 'not-met' ? 'cannot-tell' : worst([inside, asWritten]);
  return decide(-1) === 'not-met' ? 'not-met' : 'cannot-tell';
}

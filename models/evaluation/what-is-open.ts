import type { Outcome } from './evaluation.ts';
import { type Judgement, someBelieved } from './judgement.ts';

/** What keeps a limit open, to stand behind what was read and asked; nothing where it is decided. */
export function whatIsOpen(j: Judgement, outcome: Outcome, isOver: boolean, mayHide: () => boolean): string {
  if (outcome === 'met' || outcome === 'not-met') return '';
  if (outcome === 'pending') return '; the run goes on';
  if (!someBelieved(j)) return '; no sensor is left that is believed to the end';
  if (mayHide()) return '; a gap may hide more';
  return isOver ? '; the uncertainty of the reading leaves it open' : '; the log stops before it is over';
}

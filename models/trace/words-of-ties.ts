import type { Tie, TiedFactor } from './comparison.ts';
import { TELLING_P } from './p-value.ts';
import type { HeldFixed } from './stratified-test.ts';
import type { Contrast } from './tied-factors.ts';
import { sayP, startingLarge } from './words-of-comparison.ts';

/** How a factor is tied to the first of its group, and what holding either fixed shows. */
export function sayTie(first: Contrast, other: Contrast, tied: Omit<TiedFactor, 'name' | 'sentence'>): string {
  const { withFirstFixed, firstWithThisFixed, tie, association } = tied;
  const moves = startingLarge(
    `${other.label} moves with ${first.label} (association ${association.toFixed(2).replace('-', '−')}).`,
  );
  if (withFirstFixed === null || firstWithThisFixed === null) return moves;
  const words: Record<Tie, string> = {
    'cannot-tell-apart': 'The two cannot be told apart on these parts.',
    follows: `Nothing on these parts shows ${other.label} to go with failure by itself.`,
    leads: `Nothing on these parts shows ${first.label} to go with failure by itself.`,
    each: 'Each goes with failure with the other held fixed.',
    'moves-with': '',
  };
  return [moves, sayFixed(first, other, withFirstFixed), sayFixed(other, first, firstWithThisFixed), words[tie]].join(
    ' ',
  );
}

function sayFixed(fixed: Contrast, tested: Contrast, { value, leastP }: HeldFixed): string {
  const among = `With ${fixed.factor.name} held fixed,`;
  if (value.p <= TELLING_P) return `${among} ${tested.label} still goes with failure (${sayP('p', value.p)}).`;
  if (leastP > TELLING_P) {
    return `${among} too few parts differ in ${tested.label} to show anything (least possible ${sayP('p', leastP)}).`;
  }
  return `${among} ${tested.label} is no longer shown to go with failure (${sayP('p', value.p)}).`;
}

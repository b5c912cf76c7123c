import type { RunChannel } from '../run/channel.ts';
import type { SuspectedFault } from '../run/suspected-faults.ts';
import type { Finding, Outcome } from './evaluation.ts';
import { say } from './finding.ts';

/** A sensor that a person still has to decide on. */
export interface Suspect {
  readonly channel: RunChannel;
  readonly faults: readonly SuspectedFault[];
}

/** Sets of suspects up to this many are tried whole; beyond it each alone and all together. */
const TRIED_WHOLE = 4;

/**
 * Findings while suspects are undecided: worked out with them and without every set of them.
 *
 * A finding that comes out the same whatever is decided stands; one that does not cannot be told, and hangs on the
 * decision. Where none would be left, what hangs on sensors is open.
 */
export function withUndecided(
  suspects: readonly Suspect[],
  changes: Map<string, Set<string>>,
  judge: (without: readonly Suspect[]) => Finding[],
): Finding[] {
  const asIs = judge([]);
  const variants = setsOf(suspects).map((without) => ({ without, findings: judge(without) }));
  return asIs.map((finding) => {
    const differing = variants.filter(({ findings }) => outcomeOf(findings, finding) !== finding.outcome);
    if (differing.length === 0) return finding;
    const smallest = differing.reduce((a, b) => (b.without.length < a.without.length ? b : a));
    for (const { channel } of smallest.without) note(changes, channel.layout.name, finding.limit);
    const name = smallest.without[0]!.channel.layout.name;
    const other = smallest.findings.find(({ limit }) => limit === finding.limit);
    const without = smallest.without.map((suspect) => suspect.channel.layout.name).join(' and ');
    const then = other === undefined ? 'the limit does not arise' : `${words(other.outcome)}${figureOf(other)}`;
    return {
      ...finding,
      outcome: 'cannot-tell' as const,
      margin: null,
      awaits: name,
      because: `It hangs on whether ${without} ${smallest.without.length > 1 ? 'are' : 'is'} believed: with, it is ${words(finding.outcome)}${figureOf(finding)}; without, ${then}.`,
    };
  });
}

/** The outcome of the same limit without the suspects; the finding's own where the limit does not exist then. */
function outcomeOf(findings: readonly Finding[], { limit, outcome }: Finding): Outcome {
  return findings.find((one) => one.limit === limit)?.outcome ?? outcome;
}

/** Every set of suspects that is tried: all of them up to four, beyond that each alone and all together. */
export function setsOf(suspects: readonly Suspect[]): Suspect[][] {
  if (suspects.length > TRIED_WHOLE) return [...suspects.map((one) => [one]), [...suspects]];
  const sets: Suspect[][] = [];
  for (let bits = 1; bits < 1 << suspects.length; bits++) sets.push(suspects.filter((_, i) => bits & (1 << i)));
  return sets;
}

function note(changes: Map<string, Set<string>>, channel: string, limit: string): void {
  const limits = changes.get(channel) ?? new Set();
  limits.add(limit);
  changes.set(channel, limits);
}

function words(outcome: Outcome): string {
  return { met: 'met', 'not-met': 'not met', 'cannot-tell': 'open', pending: 'pending' }[outcome];
}

function figureOf({ observed, unit }: Finding): string {
  return observed === null ? '' : ` (${say(observed, 2)}${unit === '' ? '' : ` ${unit}`})`;
}

import type { Finding, Outcome, PartEvaluation } from '../evaluation/evaluation.ts';

const WORST_FIRST: readonly Outcome[] = ['not-met', 'cannot-tell', 'pending', 'met'];

/** The finding of a limit; undefined where the part has none. */
export function findingOf(part: PartEvaluation, limit: string): Finding | undefined {
  return part.findings.find((finding) => finding.limit === limit);
}

/** The worst outcome among some limits; `met` where none of them has a finding. */
export function worstOf(part: PartEvaluation, limits: readonly string[]): Outcome {
  const outcomes = part.findings.filter(({ limit }) => limits.includes(limit)).map(({ outcome }) => outcome);
  return WORST_FIRST.find((outcome) => outcomes.includes(outcome)) ?? 'met';
}

import type { Bounds } from '../cycle/cycle.ts';
import { ALLOWANCE } from './dips.ts';
import type { Finding, Outcome, Verdict } from './evaluation.ts';
import type { Judgement } from './judgement.ts';

/** A finding as a limit works it out: instants in ms, figures in the cycle's unit, nothing rounded yet. */
export interface Found {
  readonly limit: string;
  readonly outcome: Outcome;
  readonly because: string;
  readonly unit: string;
  readonly bounds?: Bounds;
  readonly observed?: number | null;
  readonly possible?: number | null;
  /** Where it is not the distance from `observed` to the nearest of `bounds`. */
  readonly margin?: number | null;
  readonly uncertainty?: number | null;
  readonly sensor?: string | null;
  readonly fromMs?: number | null;
  readonly untilMs?: number | null;
  readonly isForgiven?: boolean;
}

/** The finding as it is told: rounded to a millionth of its unit, instants as ISO 8601. */
export function finding(found: Found): Finding {
  const { bounds = {}, observed = null } = found;
  return {
    limit: found.limit,
    outcome: found.outcome,
    observed: rounded(observed),
    possible: rounded(found.possible ?? null),
    atLeast: bounds.atLeast ?? null,
    atMost: bounds.atMost ?? null,
    unit: found.unit,
    margin: rounded(found.margin === undefined ? marginTo(bounds, observed) : found.margin),
    uncertainty: rounded(found.uncertainty ?? null),
    sensor: found.sensor ?? null,
    from: iso(found.fromMs ?? null),
    until: iso(found.untilMs ?? null),
    ...(found.isForgiven ? { forgiven: true as const } : {}),
    because: found.because,
  };
}

/** Distance to the nearest limit, negative when broken; null where there is nothing to measure. */
export function marginTo({ atLeast, atMost }: Bounds, observed: number | null): number | null {
  if (observed === null) return null;
  const margins = [];
  if (atLeast !== undefined) margins.push(observed - atLeast);
  if (atMost !== undefined) margins.push(atMost - observed);
  return margins.length === 0 ? null : Math.min(...margins);
}

/** Whether a computed figure keeps a bound from below, with the allowance of 1e-9 of the figure. */
export function isAtLeast(figure: number, bound: number | undefined): boolean {
  return bound === undefined || figure >= bound - ALLOWANCE * Math.abs(figure);
}

/** Whether a computed figure keeps a bound from above, with the same allowance. */
export function isAtMost(figure: number, bound: number | undefined): boolean {
  return bound === undefined || figure <= bound + ALLOWANCE * Math.abs(figure);
}

/** What a limit whose stretch has not ended comes to. */
export function unfinished(j: Judgement): Outcome {
  return j.isOpen ? 'pending' : 'cannot-tell';
}

const RANK: Readonly<Record<Outcome, number>> = { met: 0, pending: 1, 'cannot-tell': 2, 'not-met': 3 };

/** `not-met` before `cannot-tell` before `pending` before `met`; of none, `met`. */
export function worst(outcomes: readonly Outcome[]): Outcome {
  return outcomes.reduce<Outcome>((a, b) => (RANK[b] > RANK[a] ? b : a), 'met');
}

/** ISO 8601 to the ms; null where there is no such instant. */
export function iso(ms: number | null): string | null {
  return ms === null || !Number.isFinite(ms) ? null : new Date(Math.round(ms)).toISOString();
}

function rounded(figure: number | null): number | null {
  if (figure === null || !Number.isFinite(figure)) return null;
  return Math.round(figure * 1e6) / 1e6 + 0;
}

/** A figure in a sentence: so many decimals at most, no trailing zeros. */
export function say(figure: number, decimals = 1): string {
  return String(Number(figure.toFixed(decimals)) + 0).replace('-', '−');
}

/** A figure beside its limits, with as many more decimals as it takes to tell them apart. */
export function sayBeside(figure: number, { atLeast, atMost }: Bounds, decimals = 1): string {
  const looksEqual = (bound: number | undefined, digits: number) =>
    bound !== undefined && Math.abs(figure - bound) > 1e-6 && Number(figure.toFixed(digits)) === bound;
  let digits = decimals;
  while (digits < 6 && (looksEqual(atLeast, digits) || looksEqual(atMost, digits))) digits++;
  return say(figure, digits);
}

export function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

const VERDICTS = {
  met: 'conforms',
  'not-met': 'does-not-conform',
  'cannot-tell': 'cannot-tell',
  pending: 'pending',
} as const;

/** The verdict findings come to: their worst. */
export function verdictOf(findings: readonly Finding[]): Verdict {
  return VERDICTS[worst(findings.map(({ outcome }) => outcome))];
}

import { DomainError } from '../errors.ts';

/** A distribution on whole numbers from `low` on; `logP` [n] holds the logarithm of each probability. */
export interface Distribution {
  readonly low: number;
  readonly logP: Float64Array;
}

/**
 * How many of the marked are among those drawn, drawing without replacement.
 *
 * P(t) = C(m, t) C(n, d − t) / C(m + n, d), built from the logarithm of the ratio of neighbours
 * P(t+1)/P(t) = (m − t)(d − t) / ((t + 1)(n − d + t + 1)), so that no factorial overflows.
 *
 * @param marked   m: whole, ≥ 0.
 * @param unmarked n: whole, ≥ 0.
 * @param drawn    d: whole, 0 … m + n.
 * @returns The distribution of t on max(0, d − n) … min(m, d); probabilities add up to one.
 * @throws {DomainError} `option-out-of-range` when a count is not a whole number in its range.
 *
 * Accuracy: relative 1e-12 for 10 000 parts, by the reference of test/models/trace/fisher-exact.test.ts.
 * Source: Fisher, The Design of Experiments (1935), ch. II; Agresti, Categorical Data Analysis, 2nd ed., §3.5.
 */
export function hypergeometric(marked: number, unmarked: number, drawn: number): Distribution {
  for (const [name, count] of Object.entries({ marked, unmarked, drawn })) {
    if (Number.isInteger(count) && count >= 0 && (name !== 'drawn' || count <= marked + unmarked)) continue;
    throw new DomainError('option-out-of-range', `A count of parts must be a whole number in its range: ${name}`, {
      [name]: count,
    });
  }
  const low = Math.max(0, drawn - unmarked);
  const logP = new Float64Array(Math.min(marked, drawn) - low + 1);
  for (let i = 1; i < logP.length; i += 1) {
    const t = low + i - 1;
    logP[i] = logP[i - 1]! + Math.log(((marked - t) * (drawn - t)) / ((t + 1) * (unmarked - drawn + t + 1)));
  }
  return { low, logP: normalised(logP) };
}

/** The distribution of the sum of independent counts, one a stratum; without strata it is certainly 0. */
export function sumOf(parts: readonly Distribution[]): Distribution {
  let low = 0;
  let sum = Float64Array.of(1);
  for (const part of parts) {
    low += part.low;
    if (part.logP.length === 1) continue;
    const p = part.logP.map(Math.exp);
    const longer = new Float64Array(sum.length + p.length - 1);
    for (let i = 0; i < sum.length; i += 1) {
      for (let j = 0; j < p.length; j += 1) longer[i + j]! += sum[i]! * p[j]!;
    }
    sum = longer;
  }
  return { low, logP: sum.map(Math.log) };
}

/** Weights given by their logarithms, made to add up to one. */
export function normalised(logWeight: Float64Array): Float64Array {
  let most = Number.NEGATIVE_INFINITY;
  for (const weight of logWeight) most = Math.max(most, weight);
  let sum = 0;
  for (const weight of logWeight) sum += Math.exp(weight - most);
  const logSum = most + Math.log(sum);
  return logWeight.map((weight) => weight - logSum);
}

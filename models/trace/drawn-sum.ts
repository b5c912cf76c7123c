/** Probabilities of whole sums from `low` on. */
export interface SumDistribution {
  readonly low: number;
  readonly p: Float64Array;
}

/**
 * Sum of the scores of some parts drawn without replacement from all.
 *
 * Shift algorithm: score by score the joint distribution of how many are drawn and what they add up to is carried on,
 * each part drawn independently with probability k/N; at the end only k drawn counts. All terms are positive, so the
 * tails keep their digits.
 *
 * @param scores Whole numbers, one a part.
 * @param drawn  How many are drawn, 0 … scores.length.
 * @returns Distribution of the sum; probabilities add up to one.
 *
 * Accuracy: relative 1e-11; test/models/trace/drawn-sum.test.ts by enumeration.
 * Source: Streitberg & Röhmel, EDV in Medizin und Biologie 18 (1987) 12–19; Pagano & Tritchler, JASA 78 (1983)
 *   435–440.
 */
export function drawnSum(scores: Int32Array, drawn: number): SumDistribution {
  const counts = [...countScores(scores)].sort(([a], [b]) => a - b);
  const least = counts[0]?.[0] ?? 0;
  const width = widestSum(counts, least, drawn) + 1;
  const chance = scores.length === 0 ? 0 : drawn / scores.length;
  // joint[j * width + s]: j drawn so far, their scores above the least adding up to s ≤ reach[j].
  const joint = new Float64Array((drawn + 1) * width);
  joint[0] = 1;
  const reach = new Int32Array(drawn + 1).fill(-1);
  reach[0] = 0;
  let left = scores.length;
  for (const [score, parts] of counts) {
    left -= parts;
    const step = score - least;
    const some = chances(parts, Math.min(parts, drawn), chance);
    // Fewer than this can no longer become k.
    for (let j = drawn; j >= Math.max(0, drawn - left); j -= 1) {
      const row = joint.subarray(j * width, (j + 1) * width);
      for (let s = 0; s <= reach[j]!; s += 1) row[s]! *= some[0]!;
      for (let i = 1; i <= Math.min(parts, j); i += 1) {
        const last = reach[j - i]!;
        if (last < 0) continue;
        const weight = some[i]!;
        const from = (j - i) * width;
        const to = i * step;
        for (let s = 0; s <= last; s += 1) row[to + s]! += weight * joint[from + s]!;
        reach[j] = Math.max(reach[j]!, last + to);
      }
    }
  }
  const p = joint.subarray(drawn * width);
  const sum = p.reduce((total, each) => total + each, 0);
  return { low: least * drawn, p: p.map((each) => each / sum) };
}

/** Multiplications {@link drawnSum} takes, to within a small factor. */
export function workOfDrawnSum(scores: Int32Array, drawn: number): number {
  const counts = [...countScores(scores)].sort(([a], [b]) => a - b);
  const width = widestSum(counts, counts[0]?.[0] ?? 0, drawn) + 1;
  const terms = counts.reduce((sum, [, parts]) => sum + Math.min(parts, drawn), 0);
  return (terms * drawn * width) / 4;
}

function countScores(scores: Int32Array): Map<number, number> {
  const counts = new Map<number, number>();
  for (const score of scores) counts.set(score, (counts.get(score) ?? 0) + 1);
  return counts;
}

/** The largest sum above the least score. */
function widestSum(rising: readonly (readonly [number, number])[], least: number, drawn: number): number {
  let [sum, left] = [0, drawn];
  for (const [score, parts] of rising.toReversed()) {
    const taken = Math.min(parts, left);
    sum += taken * (score - least);
    left -= taken;
  }
  return sum;
}

/** Binomial probabilities of 0 … most of the parts. */
function chances(parts: number, most: number, chance: number): Float64Array {
  const p = new Float64Array(most + 1);
  if (chance === 1) {
    p[most] = 1;
    return p;
  }
  let log = parts * Math.log1p(-chance);
  p[0] = Math.exp(log);
  for (let i = 1; i <= most; i += 1) {
    log += Math.log(((parts - i + 1) / i) * (chance / (1 - chance)));
    p[i] = Math.exp(log);
  }
  return p;
}

/**
 * Twice the midrank of each number: whole, so that sums of them are exact.
 *
 * Ranks count from 1; equal numbers share the mean of the ranks they take up.
 *
 * @param values Finite numbers.
 * @returns [n] whole numbers, 2 … 2n; their sum is n(n + 1).
 *
 * Source: Wilcoxon, Biometrics Bulletin 1 (1945) 80–83; ties: Kruskal & Wallis, JASA 47 (1952) 583–621.
 */
export function doubledMidranks(values: ArrayLike<number>): Int32Array {
  const rising = Float64Array.from(values).sort();
  const midrank = new Map<number, number>();
  for (let first = 0, next = 1; first < rising.length; first = next, next += 1) {
    while (next < rising.length && rising[next] === rising[first]) next += 1;
    midrank.set(rising[first]!, first + next + 1);
  }
  return Int32Array.from(values, (value) => midrank.get(value)!);
}

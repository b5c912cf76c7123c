export interface SpreadOptions {
  /** Least distance between two labels, in the unit of the places. */
  readonly apart: number;
  readonly lowest: number;
  readonly highest: number;
}

/**
 * Places for labels that would overlap, as near to where they belong as can be.
 *
 * Least squares of the displacements with the order kept and every two labels `apart` or more: an isotonic regression
 * of (place − rank · apart) by pooling adjacent violators, cut to the ends. Where they do not fit at all they stand
 * evenly from end to end.
 *
 * @param places  Where each label belongs: [n], in any order, finite.
 * @param options See {@link SpreadOptions}.
 * @returns [n] in the order of `places`; labels of equal place keep the order they came in.
 *
 * Source: Robertson, Wright & Dykstra, Order Restricted Statistical Inference (1988), §1.2 (pooling) and §1.5 (bounds).
 */
export function spreadLabels(places: readonly number[], { apart, lowest, highest }: SpreadOptions): number[] {
  const n = places.length;
  const fits = n < 2 || apart * (n - 1) <= highest - lowest;
  const step = fits ? apart : (highest - lowest) / (n - 1);
  const order = places.map((_, i) => i).sort((a, b) => places[a]! - places[b]! || a - b);
  const pooled = pool(order.map((i, rank) => places[i]! - rank * step));
  const room = highest - (n - 1) * step;
  const spread = new Array<number>(n);
  order.forEach((i, rank) => {
    spread[i] = Math.min(Math.max(pooled[rank]!, lowest), Math.max(lowest, room)) + rank * step;
  });
  return spread;
}

/** The nearest rising sequence: neighbours that fall are replaced by their mean until none does. */
function pool(values: readonly number[]): number[] {
  const blocks: { sum: number; count: number }[] = [];
  for (const value of values) {
    let block = { sum: value, count: 1 };
    let before = blocks.at(-1);
    while (before !== undefined && before.sum * block.count >= block.sum * before.count) {
      block = { sum: before.sum + block.sum, count: before.count + block.count };
      blocks.pop();
      before = blocks.at(-1);
    }
    blocks.push(block);
  }
  return blocks.flatMap(({ sum, count }) => new Array<number>(count).fill(sum / count));
}

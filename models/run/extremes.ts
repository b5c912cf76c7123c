const BLOCK = 64;
const BLOCK_OF_BLOCKS = BLOCK * BLOCK;

/** A growing row of figures that answers "lowest and highest between i and j" without looking at each. */
export class Extremes {
  length = 0;
  value = new Float64Array(1024);
  #low: number[] = [];
  #high: number[] = [];
  #lowOfBlocks: number[] = [];
  #highOfBlocks: number[] = [];

  /** Appends one figure. `NaN` keeps its place and is neither lowest nor highest. */
  push(value: number): void {
    const i = this.length++;
    if (i === this.value.length) {
      const grown = new Float64Array(2 * i);
      grown.set(this.value);
      this.value = grown;
    }
    this.value[i] = value;
    note(this.#low, this.#high, Math.floor(i / BLOCK), value);
    note(this.#lowOfBlocks, this.#highOfBlocks, Math.floor(i / BLOCK_OF_BLOCKS), value);
  }

  /** Index of the highest figure in [from, until], the first of equals; −1 where there is none. */
  indexOfHighest(from: number, until: number): number {
    return this.#search(from, until, 1);
  }

  /** Index of the lowest figure in [from, until], the first of equals; −1 where there is none. */
  indexOfLowest(from: number, until: number): number {
    return this.#search(from, until, -1);
  }

  #search(from: number, until: number, sign: 1 | -1): number {
    const blocks = sign > 0 ? this.#high : this.#low;
    const blocksOfBlocks = sign > 0 ? this.#highOfBlocks : this.#lowOfBlocks;
    let best = -1;
    let bestValue = Number.NEGATIVE_INFINITY;
    const end = Math.min(until, this.length - 1);
    let i = Math.max(0, from);
    while (i <= end) {
      if (i % BLOCK_OF_BLOCKS === 0 && i + BLOCK_OF_BLOCKS - 1 <= end) {
        if (!(sign * blocksOfBlocks[i / BLOCK_OF_BLOCKS]! > bestValue)) {
          i += BLOCK_OF_BLOCKS;
          continue;
        }
      }
      if (i % BLOCK === 0 && i + BLOCK - 1 <= end && !(sign * blocks[i / BLOCK]! > bestValue)) {
        i += BLOCK;
        continue;
      }
      const stop = Math.min(end, (Math.floor(i / BLOCK) + 1) * BLOCK - 1);
      for (; i <= stop; i++) {
        const candidate = sign * this.value[i]!;
        if (candidate > bestValue) {
          bestValue = candidate;
          best = i;
        }
      }
    }
    return best;
  }
}

function note(low: number[], high: number[], block: number, value: number): void {
  if (block === low.length) {
    low.push(Number.POSITIVE_INFINITY);
    high.push(Number.NEGATIVE_INFINITY);
  }
  if (value < low[block]!) low[block] = value;
  if (value > high[block]!) high[block] = value;
}

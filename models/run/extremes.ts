import { GrowingRow } from './growing-row.ts';

const BLOCK = 64;
const BLOCK_OF_BLOCKS = BLOCK * BLOCK;

/** A growing row of figures that answers "lowest and highest between i and j" without looking at each. */
export class Extremes extends GrowingRow {
  readonly #blocks = new Summary(BLOCK);
  readonly #blocksOfBlocks = new Summary(BLOCK_OF_BLOCKS);

  /** Index of the highest figure in [from, until], the first of equals; −1 where there is none but `NaN`. */
  indexOfHighest(from: number, until: number): number {
    return this.#search(from, until, 1);
  }

  /** Index of the lowest figure in [from, until], the first of equals; −1 where there is none but `NaN`. */
  indexOfLowest(from: number, until: number): number {
    return this.#search(from, until, -1);
  }

  #search(from: number, until: number, sign: 1 | -1): number {
    this.#blocks.extend(this);
    this.#blocksOfBlocks.extend(this);
    const blocks = sign > 0 ? this.#blocks.high : this.#blocks.low;
    const blocksOfBlocks = sign > 0 ? this.#blocksOfBlocks.high : this.#blocksOfBlocks.low;
    const { value } = this;
    let best = -1;
    let bestValue = Number.NEGATIVE_INFINITY;
    const end = Math.min(until, this.length - 1);
    let i = Math.max(0, from);
    while (i <= end) {
      if (i % BLOCK_OF_BLOCKS === 0 && i + BLOCK_OF_BLOCKS - 1 <= end) {
        if (!(sign * blocksOfBlocks.value[i / BLOCK_OF_BLOCKS]! > bestValue)) {
          i += BLOCK_OF_BLOCKS;
          continue;
        }
      }
      if (i % BLOCK === 0 && i + BLOCK - 1 <= end && !(sign * blocks.value[i / BLOCK]! > bestValue)) {
        i += BLOCK;
        continue;
      }
      const stop = Math.min(end, (Math.floor(i / BLOCK) + 1) * BLOCK - 1);
      for (; i <= stop; i++) {
        const candidate = sign * value[i]!;
        if (candidate > bestValue) {
          bestValue = candidate;
          best = i;
        }
      }
    }
    return best;
  }
}

/** Lowest and highest of every full block of a row. */
class Summary {
  readonly low = new GrowingRow();
  readonly high = new GrowingRow();
  readonly #size: number;

  constructor(size: number) {
    this.#size = size;
  }

  extend({ value, length }: GrowingRow): void {
    for (let start = this.low.length * this.#size; start + this.#size <= length; start += this.#size) {
      let low = Number.POSITIVE_INFINITY;
      let high = Number.NEGATIVE_INFINITY;
      for (let i = start; i < start + this.#size; i++) {
        if (value[i]! < low) low = value[i]!;
        if (value[i]! > high) high = value[i]!;
      }
      this.low.push(low);
      this.high.push(high);
    }
  }
}

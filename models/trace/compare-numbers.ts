import type { NumberFactor } from './factor.ts';
import { hodgesLehmann, type Shift } from './hodges-lehmann.ts';
import { type RankSum, rankSumTest, type Tails } from './rank-sum.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** A number measured and tested, before correction. */
export interface TestedNumbers {
  readonly kind: 'number';
  readonly factor: NumberFactor;
  readonly medianFailed: number;
  readonly medianSound: number;
  readonly rankSum: RankSum;
  readonly shift: Shift;
}

/** Tests a number, failed parts against sound ones. */
export function testNumbers(
  factor: NumberFactor,
  onRecord: Int32Array,
  isFailed: Uint8Array,
  confidence: number,
  random: UniformNumbers,
  tails: Tails,
): TestedNumbers {
  const valuesOf = (kind: 0 | 1) =>
    Float64Array.from(
      onRecord.filter((part) => isFailed[part] === kind),
      (part) => factor.values[part]!,
    );
  const [sound, failed] = [valuesOf(0), valuesOf(1)];
  return {
    kind: 'number',
    factor,
    medianFailed: median(failed),
    medianSound: median(sound),
    rankSum: rankSumTest(failed, sound, random, tails),
    shift: hodgesLehmann(failed, sound, tails, confidence),
  };
}

function median(values: Float64Array): number {
  const rising = values.slice().sort();
  const middle = Math.floor(rising.length / 2);
  return rising.length % 2 === 1 ? rising[middle]! : (rising[middle - 1]! + rising[middle]!) / 2;
}

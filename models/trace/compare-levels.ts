import type { LevelFactor } from './factor.ts';
import { fisherExact, type TwoByTwo } from './fisher-exact.ts';
import { freemanHalton } from './freeman-halton.ts';
import { exactly, type PValue } from './p-value.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** Levels counted and tested, before correction. */
export interface TestedLevels {
  readonly kind: 'level';
  readonly factor: LevelFactor;
  /** Strongest first. */
  readonly levels: readonly { readonly level: string; readonly table: TwoByTwo; readonly value: PValue | null }[];
  readonly overall: PValue | null;
}

/**
 * Tests each level of a factor against all other parts, and all levels at once where there are three or more.
 *
 * A factor of two levels is one test, of the level the failed parts have more often. Of three and more, a level that a
 * single part has is counted but not tested: it cannot be what failed parts share, and testing it would only weigh down
 * the correction. (With one failed part nothing is shared, and all are tested.)
 *
 * @param onRecord Places of the parts with a value.
 */
export function testLevels(
  factor: LevelFactor,
  onRecord: Int32Array,
  isFailed: Uint8Array,
  random: UniformNumbers,
): TestedLevels {
  const isExclusive = factor.values.every((value) => !Array.isArray(value) || new Set(value).size === 1);
  const counted = countLevels(factor, onRecord, isFailed);
  const isBinary = isExclusive && counted.length === 2;
  const failed = onRecord.reduce((sum, part) => sum + isFailed[part]!, 0);
  const leastHolders = isBinary ? 1 : Math.min(2, failed);
  const levels = counted
    .sort((a, b) => shareDifference(b.table) - shareDifference(a.table))
    .map((row, at) => {
      const having = row.table.failedWith + row.table.soundWith;
      const isTested = having >= leastHolders && having < onRecord.length && !(isBinary && at === 1);
      return { ...row, value: isTested ? exactly(fisherExact(row.table).twoSided) : null };
    });
  const tested = levels.filter(({ value }) => value !== null).length;
  const counts = levels.map(({ table }) => ({ failed: table.failedWith, sound: table.soundWith }));
  const overall = isExclusive && levels.length > 2 && tested > 1 ? freemanHalton(counts, random) : null;
  return { kind: 'level', factor, levels: levels.sort((a, b) => pOf(a.value) - pOf(b.value)), overall };
}

/** Share of the failed parts that have the level, less that of the sound ones. */
export function shareDifference({ failedWith, failedWithout, soundWith, soundWithout }: TwoByTwo): number {
  return failedWith / (failedWith + failedWithout) - soundWith / (soundWith + soundWithout);
}

function pOf(value: PValue | null): number {
  return value?.p ?? 2;
}

function countLevels(
  factor: LevelFactor,
  onRecord: Int32Array,
  isFailed: Uint8Array,
): { level: string; table: TwoByTwo }[] {
  const counts = new Map<string, [sound: number, failed: number]>();
  const all: [number, number] = [0, 0];
  for (const part of onRecord) {
    const value = factor.values[part]!;
    all[isFailed[part]!]! += 1;
    for (const level of typeof value === 'string' ? [value] : new Set(value)) {
      const count = counts.get(level) ?? [0, 0];
      count[isFailed[part]!]! += 1;
      counts.set(level, count);
    }
  }
  return [...counts].map(([level, [soundWith, failedWith]]) => ({
    level,
    table: { failedWith, failedWithout: all[1] - failedWith, soundWith, soundWithout: all[0] - soundWith },
  }));
}

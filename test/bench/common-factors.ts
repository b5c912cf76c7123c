import { compareFailed } from '../../models/trace/compare-failed.ts';
import type { Factor, TracedPart } from '../../models/trace/factor.ts';
import { type UniformNumbers, uniformNumbers } from '../../models/trace/uniform-numbers.ts';
import { type BenchResult, medianMs } from './result.ts';

const MOST_MS = 1000;
const PARTS = 2000;
const FAILED = 40;
const PARTS_IN_LOAD = 10;

/**
 * What 40 failed among 2 000 parts share: 30 factors of 2 to 60 levels and 30 numbers, most of them the same over a load,
 * one in twenty values not on record. Most failures are on one bag line. Floor: one pass over all values.
 */
export async function benchCommonFactors(): Promise<BenchResult[]> {
  const random = uniformNumbers(20260302);
  const bagLine = Array.from({ length: PARTS }, () => `V${1 + Math.floor(random() * 12)}`);
  const parts = plantFailures(bagLine, random);
  const factors: Factor[] = [
    { kind: 'level', name: 'bag line', values: bagLine },
    ...Array.from({ length: 59 }, (_, n) => (n % 2 === 0 ? numbers(n, random) : levels(n, random))),
  ];
  const value = medianMs(5, () => compareFailed(parts, factors));
  const floor = medianMs(5, () => {
    let onRecord = 0;
    for (const { values } of factors) for (const each of values) if (each !== null) onRecord += 1;
    if (onRecord === 0) throw new Error('the floor was not measured');
  });
  const { factors: ranked, tests } = compareFailed(parts, factors);
  const isFound = ranked[0]?.name === 'bag line';
  return [
    {
      name: 'common-factors',
      value,
      unit: 'ms',
      floor,
      ratio: value / floor,
      goal: `≤ ${MOST_MS} ms, the planted one first`,
      holds: value <= MOST_MS && isFound,
      note: `${FAILED} failed among ${PARTS}, ${factors.length} factors, ${tests} tests; first: ${ranked[0]?.name}`,
    },
  ];
}

function plantFailures(bagLine: readonly string[], random: UniformNumbers): TracedPart[] {
  const failed = new Set<number>();
  while (failed.size < FAILED) {
    const part = Math.floor(random() * PARTS);
    if (bagLine[part] === 'V3' || random() < 0.02) failed.add(part);
  }
  return bagLine.map((_, i) => ({ id: `part ${i}`, failed: failed.has(i) }));
}

function numbers(n: number, random: UniformNumbers): Factor {
  const measure = () => Math.round(random() * 1000) / 10;
  return { kind: 'number', name: `number ${n}`, unit: 'min', values: overParts(n, measure, random) };
}

function levels(n: number, random: UniformNumbers): Factor {
  const level = () => `L${Math.floor(random() * (n + 1))}`;
  return { kind: 'level', name: `levels ${n}`, values: overParts(n, level, random) };
}

/** Two in three are the same over a load. */
function overParts<T>(n: number, one: () => T, random: UniformNumbers): (T | null)[] {
  const ofLoad = Array.from({ length: PARTS / PARTS_IN_LOAD }, one);
  return Array.from({ length: PARTS }, (_, i) => {
    if (random() < 0.05) return null;
    return n % 3 === 0 ? one() : ofLoad[Math.floor(i / PARTS_IN_LOAD)]!;
  });
}

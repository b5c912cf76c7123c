import type { LevelFactor } from './factor.ts';

/** Parts in one class of a number at least; classes of few parts leave little of the number to vary within one. */
const PARTS_IN_CLASS = 10;

/**
 * Classes of parts alike in a factor of levels: the same level, or the same set of levels.
 *
 * @returns Class of each part, from 0; −1 where nothing is on record.
 */
export function classesOfLevels({ values }: LevelFactor): Int32Array {
  const classOf = new Map<string, number>();
  return Int32Array.from(values, (value) => {
    if (value === null) return -1;
    const key = typeof value === 'string' ? JSON.stringify([value]) : JSON.stringify([...new Set(value)].sort());
    const known = classOf.get(key) ?? classOf.size;
    classOf.set(key, known);
    return known;
  });
}

/**
 * Classes of neighbours in a number.
 *
 * Cut, in rising order, into classes of ten parts or more; equal numbers are never parted. Who failed is not looked at, so
 * failure may still be dealt out anew within a class.
 *
 * @param values Numbers of the parts, or their ranks.
 * @returns Class of each part, from 0.
 *
 * Source: Cochran, Biometrics 24 (1968) 295–313: five classes take away some 90 % of what a number would feign; these are
 *   as many as the parts allow.
 */
export function classesOfNumbers(values: Float64Array): Int32Array {
  const rising = Array.from(values, (_, at) => at).sort((a, b) => values[a]! - values[b]!);
  const classes = new Int32Array(values.length);
  let [current, size] = [0, 0];
  let last = Number.NaN;
  for (const at of rising) {
    const value = values[at]!;
    if (size >= PARTS_IN_CLASS && value !== last) [current, size] = [current + 1, 0];
    classes[at] = current;
    size += 1;
    last = value;
  }
  return classes;
}

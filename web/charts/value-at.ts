import type { Line } from '../../models/chart/chart.ts';

/** What a course shows at an hour: the nearest reading drawn, or `null` where the line is broken or not there. */
export function valueAt({ hours, value }: Pick<Line, 'hours' | 'value'>, atH: number): number | null {
  const after = firstNotBefore(hours, atH);
  const [left, right] = [hours[after - 1], hours[after]];
  if (left === undefined && right === undefined) return null;
  if (left === undefined) return right === atH ? (value[after] ?? null) : null;
  if (right === undefined) return left === atH ? (value[after - 1] ?? null) : null;
  return value[atH - left < right - atH ? after - 1 : after] ?? null;
}

/** The last value a course shows up to an hour. */
export function lastValue({ hours, value }: Pick<Line, 'hours' | 'value'>, untilH: number): number | null {
  for (let n = firstNotBefore(hours, untilH + 1e-9) - 1; n >= 0; n -= 1) {
    const last = value[n];
    if (last !== null && last !== undefined) return last;
  }
  return null;
}

function firstNotBefore(hours: readonly number[], atH: number): number {
  let low = 0;
  let high = hours.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((hours[middle] ?? 0) < atH) low = middle + 1;
    else high = middle;
  }
  return low;
}

import { level, nextUp, type Row } from '../../../server/practice/simulator/crossings.ts';
import type { Truth } from '../../../server/practice/simulator/truth.ts';

/** Figures read off a noise-free history, each by the plainest way there is. Minutes are from the first scan. */

export function junctionOf({ history, channels }: Truth, channel: string): Row {
  return { values: history.junctionC[channels.indexOf(channel)]!, stepMin: history.stepS / 60 };
}

export function allReachMin(truth: Truth, temperatureC: number): number {
  return Math.max(...truth.channels.map((channel) => nextUp(junctionOf(truth, channel), temperatureC, 0)!));
}

/** When the leading sensor has first risen by 5 °C. */
export function heatOnMin(truth: Truth): number {
  return Math.min(
    ...truth.channels.map((channel) => {
      const row = junctionOf(truth, channel);
      return nextUp(row, row.values[0]! + 5, 0)!;
    }),
  );
}

export function least(values: Float64Array, stepMin: number, fromMin: number, untilMin: number): number {
  return Math.min(...values.subarray(Math.ceil(fromMin / stepMin), Math.floor(untilMin / stepMin) + 1));
}

/** Greatest least-squares slope, °C/min, over windows that start at each reading and lie between two temperatures. */
export function greatestSlope(row: Row, over: readonly [number, number], windowMin: number, everyMin: number): number {
  const fromMin = nextUp(row, over[0], 0)!;
  const untilMin = nextUp(row, over[1], fromMin)!;
  let most = -Infinity;
  for (let start = Math.ceil(fromMin / everyMin) * everyMin; start + windowMin <= untilMin; start += everyMin) {
    most = Math.max(most, slopeOver(row, start, windowMin, everyMin));
  }
  return most;
}

function slopeOver(row: Row, fromMin: number, windowMin: number, everyMin: number): number {
  const minutes = Array.from({ length: Math.floor(windowMin / everyMin + 1e-9) + 1 }, (_, i) => fromMin + i * everyMin);
  const meanMin = minutes.reduce((sum, minute) => sum + minute, 0) / minutes.length;
  const product = minutes.reduce((sum, minute) => sum + (minute - meanMin) * level(row, minute), 0);
  return product / minutes.reduce((sum, minute) => sum + (minute - meanMin) ** 2, 0);
}

import type { ReadLog } from '../../models/log/readings.ts';

/** A log by another clock: so much is added to its instants. */
export function shiftedLog(log: ReadLog, shiftMs: number): ReadLog {
  if (shiftMs === 0) return log;
  const { timeMs, channels } = log.readings;
  return { ...log, readings: { timeMs: timeMs.map((at) => at + shiftMs), channels } };
}

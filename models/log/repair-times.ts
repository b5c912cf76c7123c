import { DomainError } from '../errors.ts';
import type { Layout } from './layout.ts';
import { medianIntervalMs } from './pieces.ts';
import type { Repair } from './readings.ts';
import { placeOf, repairList } from './repair-list.ts';
import { instantsInZone } from './repeated-hour.ts';
import { partSameStamps } from './same-stamp.ts';
import type { Scans } from './scan-table.ts';
import { leaveOutSentTwice } from './scans-sent-twice.ts';
import { stampsOfLayout } from './stamps-of-layout.ts';
import { mendStepsBack } from './steps-back.ts';
import { findZone } from './time-zone.ts';

/** The scans that stay, each with an instant of its own. */
export interface RepairedTimes {
  /** [n] ms since 1970-01-01T00:00:00Z, strictly rising. */
  readonly timeMs: Float64Array;
  /** [n] the scans that stay, in their order; null is all of them as they stand. */
  readonly order: Uint32Array | null;
  readonly repairs: readonly Repair[];
}

/**
 * Turns stamps into instants that strictly rise, by the five repairs in their order: the hour that comes twice, scans
 * sent twice, pieces out of order, a clock set back, scans of one stamp. Each is listed with its lines.
 */
export function repairTimes(log: Scans, layout: Layout, files: readonly string[]): RepairedTimes {
  const list = repairList(log);
  const { time } = layout;
  const isAbsolute = 'elapsed' in time || stampsOfLayout(time, '.', 'utf-8').isAbsolute;
  const timeMs = isAbsolute || !('zone' in time) ? log.stampMs : instantsInZone(log, findZone(time.zone), files, list);
  if (doRise(timeMs)) return { timeMs, order: null, repairs: list.repairs };

  let sequence: readonly number[] = Array.from(timeMs, (_, i) => i);
  const intervalMs = medianIntervalMs(sequence, timeMs);
  sequence = leaveOutSentTwice(sequence, log, timeMs, intervalMs, list);
  sequence = mendStepsBack(sequence, log, timeMs, intervalMs, files, list);
  sequence = partSameStamps(sequence, log, timeMs, list);
  const mendedMs = Float64Array.from(sequence, (scan) => timeMs[scan]!);
  if (!doRise(mendedMs)) throw tooDense(log, files, sequence, mendedMs);
  return { timeMs: mendedMs, order: Uint32Array.from(sequence), repairs: list.repairs };
}

function doRise(timeMs: Float64Array): boolean {
  for (let i = 1; i < timeMs.length; i++) if (!(timeMs[i]! > timeMs[i - 1]!)) return false;
  return true;
}

/** More scans than milliseconds under one stamp: no recorder of a cure writes that. */
function tooDense(
  log: Scans,
  files: readonly string[],
  sequence: readonly number[],
  timeMs: Float64Array,
): DomainError {
  const place = timeMs.findIndex((time, i) => i > 0 && !(time > timeMs[i - 1]!));
  const { file, line } = placeOf(log, files, sequence[place]!);
  return new DomainError('log-time-ambiguous', `${file}, line ${line}: too many scans have one stamp to be spread`, {
    file,
    line,
  });
}

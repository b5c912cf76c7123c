import { DomainError } from '../errors.ts';
import type { Layout } from './layout.ts';
import type { LogFile } from './log-file.ts';
import { passedOverList } from './passed-over.ts';
import { readFile } from './read-file.ts';
import type { PassedOver, ReadLog } from './readings.ts';
import { repairTimes } from './repair-times.ts';
import { createScanTable } from './scan-table.ts';

export interface ReadLogOptions {
  /** How many bytes are held at a time; any number reads the same. Default 256 KiB. */
  readonly windowBytes?: number;
}

/**
 * The readings of one run, from the files of its recorder in the order they are given.
 *
 * What cannot be read is refused with file, line and column; lines that hold no reading, and what was done to the times,
 * are listed.
 */
export function readLog(files: readonly LogFile[], layout: Layout, { windowBytes }: ReadLogOptions = {}): ReadLog {
  if (files.length === 0) throw new DomainError('log-empty', 'There is no file to read');
  const table = createScanTable(layout.channels.length);
  const passedOver: PassedOver[] = [];
  for (const [index, file] of files.entries()) {
    table.firstOfFile.push(table.count);
    readFile(file, layout, table, passedOverList(index, passedOver), windowBytes);
  }
  const { timeMs, scans, repairs } = repairTimes(
    table,
    layout,
    files.map(({ name }) => name),
  );
  const channels = layout.channels.map((channel, k) => ({ channel, value: picked(table.values[k]!, scans) }));
  return { readings: { timeMs, channels }, repairs, passedOver };
}

/** The figures of the scans that stay, in their order. */
function picked(figures: Float64Array, scans: Uint32Array): Float64Array {
  const value = new Float64Array(scans.length);
  for (let i = 0; i < scans.length; i++) value[i] = figures[scans[i]!]!;
  return value;
}

import { DomainError } from '../errors.ts';
import type { Layout } from './layout.ts';
import type { LogFile } from './log-file.ts';
import { passedOverList } from './passed-over.ts';
import { readFile } from './read-file.ts';
import type { PassedOver, ReadLog } from './readings.ts';
import { repairTimes } from './repair-times.ts';
import { createScanTable, finishScans, scansTaken } from './scan-table.ts';

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
    table.firstOfFile.push(scansTaken(table));
    readFile(file, layout, table, passedOverList(index, passedOver), windowBytes);
  }
  const scans = finishScans(table);
  const names = files.map(({ name }) => name);
  const { timeMs, order, repairs } = repairTimes(scans, layout, names);
  const channels = layout.channels.map((channel, k) => ({ channel, value: inOrder(scans.values[k]!, order) }));
  return { readings: { timeMs, channels }, repairs, passedOver };
}

/** The figures of the scans that stay, in their order; null is all of them as they stand. */
function inOrder(figures: Float64Array, order: Uint32Array | null): Float64Array {
  if (!order) return figures;
  const value = new Float64Array(order.length);
  for (let i = 0; i < order.length; i++) value[i] = figures[order[i]!]!;
  return value;
}

import type { Layout } from './layout.ts';
import type { LogFile } from './log-file.ts';
import { passedOverList } from './passed-over.ts';
import { readFile } from './read-file.ts';
import type { PassedOver, Repair } from './readings.ts';
import { repairTimes } from './repair-times.ts';
import { createScanTable, finishScans } from './scan-table.ts';

/** What the later lines of a log hold. */
export interface Growth {
  readonly scans: readonly GrownScan[];
  /** Repairs that touched a later line. */
  readonly repairs: readonly Repair[];
  readonly passedOver: readonly PassedOver[];
}

export interface GrownScan {
  /** Ms since 1970-01-01T00:00:00Z. */
  readonly timeMs: number;
  /** [channels], as in the file; NaN is absent. */
  readonly figures: Float64Array;
}

/**
 * The scans that stand behind a line of a log, in rising time. The lines before it are read too: only beside them can
 * be seen that a clock was set back, or how scans of one stamp are to be spread.
 *
 * @throws {DomainError} as `readLog`.
 */
export function readGrowth(file: LogFile, layout: Layout, afterLine: number): Growth {
  const table = createScanTable(layout.channels.length);
  const passedOver: PassedOver[] = [];
  table.firstOfFile.push(0);
  readFile(file, layout, table, passedOverList(0, passedOver));
  const log = finishScans(table);
  const { timeMs, order, repairs } = repairTimes(log, layout, [file.name]);
  const scans: GrownScan[] = [];
  for (let i = 0; i < timeMs.length; i++) {
    const scan = order ? order[i]! : i;
    if (log.line[scan]! <= afterLine) continue;
    scans.push({ timeMs: timeMs[i]!, figures: Float64Array.from(log.values, (value) => value[scan]!) });
  }
  return {
    scans,
    repairs: repairs.filter(({ lines }) => lines[1] > afterLine),
    passedOver: passedOver.filter(({ lines }) => lines[1] > afterLine),
  };
}

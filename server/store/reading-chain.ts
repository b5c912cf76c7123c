import { createHash } from 'node:crypto';
import type { Readings } from '../../models/log/readings.ts';

/**
 * SHA-256 of a source's readings in their canonical form, which does not know how they are stored.
 *
 * Canonical form: the channels' names as a JSON array and a line feed, in UTF-8; then, scan by scan in order of time,
 * the instant in ms since 1970-01-01T00:00:00Z and each channel's figure as it stands in the file, in the order of
 * the names, each as IEEE 754 binary64, little endian. An absent reading is the quiet NaN 0x7ff8000000000000; minus
 * zero is written as zero.
 */
export function chainOfReadings(readings: Readings): string {
  const { timeMs, channels } = readings;
  const hash = createHash('sha256').update(`${JSON.stringify(channels.map(({ channel }) => channel.name))}\n`);
  const width = channels.length + 1;
  const block = new DataView(new ArrayBuffer(SCANS_AT_ONCE * width * 8));
  for (let first = 0; first < timeMs.length; first += SCANS_AT_ONCE) {
    const scans = Math.min(SCANS_AT_ONCE, timeMs.length - first);
    writeColumn(block, timeMs, first, scans, 0, width);
    channels.forEach(({ value }, n) => {
      writeColumn(block, value, first, scans, n + 1, width);
    });
    hash.update(new Uint8Array(block.buffer, 0, scans * width * 8));
  }
  return hash.digest('hex');
}

const SCANS_AT_ONCE = 1024;

function writeColumn(
  block: DataView,
  value: Float64Array,
  first: number,
  scans: number,
  column: number,
  width: number,
): void {
  for (let scan = 0; scan < scans; scan += 1) {
    const figure = value[first + scan] ?? Number.NaN;
    const at = (scan * width + column) * 8;
    if (Number.isNaN(figure)) block.setBigUint64(at, ABSENT, true);
    else block.setFloat64(at, figure + 0, true);
  }
}

/** One bit pattern for all: a NaN's payload is not told apart by arithmetic, but it would be by a hash. */
const ABSENT = 0x7ff8000000000000n;

import { type Readings, scaledReading } from '../../models/log/readings.ts';
import { readRunLog, sourceInputs } from '../actions/run-inputs.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { requireRun } from '../store/runs.ts';
import type { Download } from './handler.ts';

/** All readings of a run as a table: instants in UTC, each channel in its own unit, an absent reading an empty cell. */
export function readingsCsv(db: Db, run: number): Download {
  requireRun(db, run);
  const { readings } = readRunLog(sourceInputs(db, run));
  return { name: `run-${run}-readings.csv`, chunks: rowsOf(readings) };
}

const ROWS_AT_ONCE = 500;

function* rowsOf({ timeMs, channels }: Readings): Generator<string> {
  yield `${['time_utc', ...channels.map(({ channel }) => cell(`${channel.name} [${channel.unit}]`))].join(',')}\r\n`;
  for (let first = 0; first < timeMs.length; first += ROWS_AT_ONCE) {
    let rows = '';
    timeMs.subarray(first, first + ROWS_AT_ONCE).forEach((at, offset) => {
      const figures = channels.map(({ channel, value }) =>
        figure(scaledReading(value[first + offset] ?? NaN, channel)),
      );
      rows += `${isoFromMs(at)},${figures.join(',')}\r\n`;
    });
    yield rows;
  }
}

function figure(reading: number): string {
  return Number.isNaN(reading) ? '' : String(reading);
}

/** RFC 4180: a cell with a delimiter, a quote or a line break stands in quotes, its quotes doubled. */
function cell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

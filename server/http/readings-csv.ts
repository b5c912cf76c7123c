import type { JoinedReadings } from '../../models/log/join-channels.ts';
import { scaledReading } from '../../models/log/readings.ts';
import type { MergedLog } from '../actions/merge-logs.ts';
import { readRunSources, sourceInputs } from '../actions/run-inputs.ts';
import { isoFromMs } from '../store/instants.ts';
import { requireRun } from '../store/runs.ts';
import type { AppParts } from './app-parts.ts';
import { csvCell } from './csv-cell.ts';
import type { Download } from './handler.ts';

/**
 * All readings of a run as a table: instants in UTC, each channel in its own unit, an absent reading an empty cell.
 * A channel that several sources read is followed by the number of the source that read it.
 */
export async function readingsCsv({ db, stored }: Pick<AppParts, 'db' | 'stored'>, run: number): Promise<Download> {
  requireRun(db, run);
  const merged = stored === undefined ? readRunSources(sourceInputs(db, run)) : await stored.read(run);
  return { name: `run-${run}-readings.csv`, chunks: rowsOf(merged) };
}

/** A few ms of work, so that what comes meanwhile waits no longer. */
const ROWS_AT_ONCE = 100;

function* rowsOf({ log, joined }: MergedLog): Generator<string> {
  const { timeMs } = log.readings;
  const channels = log.readings.channels.map((one) => {
    const join = joined.find(({ channel }) => channel.name === one.channel.name);
    return { ...one, sourceAt: join === undefined ? null : sourcesOf(join) };
  });
  const headings = channels.flatMap(({ channel, sourceAt }) => [
    csvCell(`${channel.name} [${channel.unit}]`),
    ...(sourceAt === null ? [] : [csvCell(`${channel.name} source`)]),
  ]);
  yield `${['time_utc', ...headings].join(',')}\r\n`;
  for (let first = 0; first < timeMs.length; first += ROWS_AT_ONCE) {
    let rows = '';
    timeMs.subarray(first, first + ROWS_AT_ONCE).forEach((at, offset) => {
      const figures = channels.flatMap(({ channel, value, sourceAt }) => [
        figure(scaledReading(value[first + offset] ?? NaN, channel)),
        ...(sourceAt === null ? [] : [sourceAt.get(at) ?? '']),
      ]);
      rows += `${isoFromMs(at)},${figures.join(',')}\r\n`;
    });
    yield rows;
  }
}

function sourcesOf({ timeMs, source }: JoinedReadings): ReadonlyMap<number, number> {
  return new Map(Array.from(timeMs, (at, n) => [at, source[n] ?? 0]));
}

function figure(reading: number): string {
  return Number.isNaN(reading) ? '' : String(reading);
}

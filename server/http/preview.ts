import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { type ChannelReadings, type Readings, scaledReading } from '../../models/log/readings.ts';
import { temperaturesOfEmf } from '../../models/log/temperatures-of-emf.ts';
import type { IncomingFile } from '../actions/incoming-file.ts';
import { logFileOf } from '../actions/log-file-of.ts';
import type { Preview } from '../contract/imports.ts';
import { isoFromMs } from '../store/instants.ts';

const FIRST_SCANS = 12;

/** A file read whole by a layout, nothing kept: what a person looks at before making a run of it. */
export async function previewOf(file: IncomingFile, document: Layout): Promise<Preview> {
  const { readings: asRead, repairs, passedOver } = readLog([await logFileOf(file)], parseLayout(document));
  const readings = temperaturesOfEmf(asRead);
  const { timeMs, channels } = readings;
  return {
    scans: timeMs.length,
    from: isoFromMs(timeMs[0] ?? Number.NaN),
    until: isoFromMs(timeMs.at(-1) ?? Number.NaN),
    intervalS: medianIntervalS(timeMs),
    channels: channels.map(channelPreview),
    first: firstScans(readings),
    repairs: [...repairs],
    passedOver: [...passedOver],
  };
}

function channelPreview({ channel, value }: ChannelReadings): Preview['channels'][number] {
  let least: number | null = null;
  let greatest: number | null = null;
  let absent = 0;
  for (const figure of value) {
    if (Number.isNaN(figure)) {
      absent += 1;
      continue;
    }
    const reading = scaledReading(figure, channel);
    if (least === null || reading < least) least = reading;
    if (greatest === null || reading > greatest) greatest = reading;
  }
  return { name: channel.name, role: channel.role, unit: channel.unit, least, greatest, absent };
}

function firstScans({ timeMs, channels }: Readings): Preview['first'] {
  return [...timeMs.subarray(0, FIRST_SCANS)].map((at, scan) => ({
    at: isoFromMs(at),
    values: channels.map(({ channel, value }) => {
      const figure = value[scan] ?? Number.NaN;
      return Number.isNaN(figure) ? null : scaledReading(figure, channel);
    }),
  }));
}

function medianIntervalS(timeMs: Float64Array): number | null {
  if (timeMs.length < 2) return null;
  const intervals = timeMs
    .slice(1)
    .map((at, n) => at - (timeMs[n] ?? at))
    .sort();
  return (intervals[intervals.length >> 1] ?? 0) / 1000;
}

import { presentReadings } from '../../models/log/join-channels.ts';
import { findShift, type ShiftEvidence } from '../../models/log/join-shift.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { ChannelReadings, Readings } from '../../models/log/readings.ts';
import { temperaturesOfEmf } from '../../models/log/temperatures-of-emf.ts';
import type { Db } from '../store/database.ts';
import { requireRun } from '../store/runs.ts';
import { countSourcesOf } from '../store/sources.ts';
import type { IncomingFile } from './incoming-file.ts';
import { type MergedLog, mergeLogs } from './merge-logs.ts';
import { readRunLog, sourceInputs } from './run-inputs.ts';
import { shiftedLog } from './shifted-log.ts';
import { readFiles } from './write-source.ts';

/** What joining a file to a run would make of it. */
export interface JoinPreview {
  readonly merged: MergedLog;
  /** Number the file would have among the run's sources. */
  readonly source: number;
  readonly evidence: ShiftEvidence;
  /** Channels of the file the run has not. */
  readonly ownChannels: readonly string[];
}

/** Joins a file to a run for a look; nothing is written. */
export async function previewJoin(
  db: Db,
  run: number,
  { file, layout, shiftMs }: { readonly file: IncomingFile; readonly layout: Layout; readonly shiftMs: number },
): Promise<JoinPreview> {
  requireRun(db, run);
  const { log } = await readFiles([file], layout);
  const later = { ...log, readings: temperaturesOfEmf(log.readings) };
  const earlier = readRunLog(sourceInputs(db, run));
  const source = 1 + countSourcesOf(db, run);
  const merged = mergeLogs([
    { n: 1, fills: false, log: earlier },
    { n: source, fills: true, log: shiftedLog(later, shiftMs) },
  ]);
  const names = new Set(earlier.readings.channels.map(({ channel }) => channel.name));
  return {
    merged,
    source,
    evidence: findShift(sharedChannels(earlier.readings, later.readings, source)),
    ownChannels: later.readings.channels.flatMap(({ channel: { name } }) => (names.has(name) ? [] : [name])),
  };
}

function sharedChannels(earlier: Readings, later: Readings, source: number) {
  const present = ({ channel, value }: ChannelReadings, timeMs: Float64Array, n: number) =>
    presentReadings(channel, timeMs, value, n);
  return later.channels.flatMap((own) => {
    const same = earlier.channels.find(({ channel }) => channel.name === own.channel.name);
    if (same === undefined || same.channel.unit !== own.channel.unit) return [];
    return [{ earlier: present(same, earlier.timeMs, 1), later: present(own, later.timeMs, source) }];
  });
}

import type { JoinedReadings } from '../../models/log/join-channels.ts';
import type { MergedLog } from '../actions/merge-logs.ts';
import { readRunSources, sourceInputs } from '../actions/run-inputs.ts';
import type { JoinedChannel } from '../contract/runs.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { remember } from './remember.ts';

/** Channels of a run that more than one source read. */
export function joinedChannels(db: Db, run: number): JoinedChannel[] {
  const sources = sourceInputs(db, run);
  const key = `joined ${run} ${sources.map(({ chainSha256, layoutSha256, shiftMs }) => [chainSha256, layoutSha256, shiftMs]).join()}`;
  return remember(db, key, () => joinedOf(readRunSources(sources)));
}

/** What was joined in a log, channel by channel. */
export function joinedOf({ joined, differences }: MergedLog): JoinedChannel[] {
  return joined.map((readings) => ({
    channel: readings.channel.name,
    stretches: stretchesOf(readings),
    differences: differences
      .filter(({ channel }) => channel === readings.channel.name)
      .map(({ channel: _channel, largest, ...difference }) => ({
        ...difference,
        largest: largest === null ? null : { difference: largest.difference, at: isoFromMs(largest.atMs) },
      })),
  }));
}

function stretchesOf({ timeMs, source }: JoinedReadings): JoinedChannel['stretches'] {
  const stretches: JoinedChannel['stretches'] = [];
  let first = 0;
  source.forEach((own, n) => {
    if (source[n + 1] === own) return;
    const [from, until] = [isoFromMs(timeMs[first] ?? 0), isoFromMs(timeMs[n] ?? 0)];
    stretches.push({ source: own, from, until, readings: n - first + 1 });
    first = n + 1;
  });
  return stretches;
}

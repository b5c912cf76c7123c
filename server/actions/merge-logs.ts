import { DomainError } from '../../models/errors.ts';
import type { ChannelReadings, ReadLog } from '../../models/log/readings.ts';

/**
 * One log of what several sources recorded: their scans in order of time, a channel that a source did not scan at an
 * instant absent there. Each source keeps its own clock; nothing is shifted.
 */
export function mergeLogs(logs: readonly ReadLog[]): ReadLog {
  const [only] = logs;
  if (logs.length === 1 && only !== undefined) return only;
  refuseChannelsTwice(logs);
  const timeMs = Float64Array.from(new Set(logs.flatMap(({ readings }) => [...readings.timeMs]))).sort();
  const placeOf = new Map<number, number>();
  timeMs.forEach((at, scan) => {
    placeOf.set(at, scan);
  });
  return {
    readings: {
      timeMs,
      channels: logs.flatMap(({ readings }) => readings.channels.map((own) => spread(own, readings.timeMs, placeOf))),
    },
    repairs: logs.flatMap(({ repairs }) => repairs),
    passedOver: logs.flatMap(({ passedOver }) => passedOver),
  };
}

function spread(
  { channel, value }: ChannelReadings,
  timeMs: Float64Array,
  placeOf: ReadonlyMap<number, number>,
): ChannelReadings {
  const all = new Float64Array(placeOf.size).fill(Number.NaN);
  timeMs.forEach((at, scan) => {
    all[placeOf.get(at) ?? 0] = value[scan] ?? Number.NaN;
  });
  return { channel, value: all };
}

function refuseChannelsTwice(logs: readonly ReadLog[]): void {
  const seen = new Set<string>();
  for (const { channel } of logs.flatMap(({ readings }) => readings.channels)) {
    if (seen.has(channel.name)) {
      throw new DomainError(
        'state-conflict',
        `Two sources of the run have a channel called "${channel.name}"; one of them needs another name in its layout`,
        { channel: channel.name },
      );
    }
    seen.add(channel.name);
  }
}

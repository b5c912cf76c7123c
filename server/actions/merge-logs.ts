import { DomainError } from '../../models/errors.ts';
import {
  type JoinDifference,
  type JoinedReadings,
  joinChannels,
  presentReadings,
  usualIntervalMs,
} from '../../models/log/join-channels.ts';
import type { ChannelReadings, ReadLog } from '../../models/log/readings.ts';

/** One source of a run, read. */
export interface LogOfSource {
  readonly n: number;
  /** Whether its channels may be those of an earlier source, and fill what that one did not read. */
  readonly fills: boolean;
  readonly log: ReadLog;
}

/** One log of all sources of a run, and what was joined in it. */
export interface MergedLog {
  readonly log: ReadLog;
  /** Channels that more than one source read. */
  readonly joined: readonly JoinedReadings[];
  readonly differences: readonly JoinDifference[];
}

/**
 * One log of what several sources recorded: their scans in order of time, a channel that a source did not scan at an
 * instant absent there. Each source keeps its own clock unless a person had it shifted.
 */
export function mergeLogs(sources: readonly LogOfSource[]): MergedLog {
  const [only] = sources;
  if (sources.length === 1 && only !== undefined) return { log: only.log, joined: [], differences: [] };
  const columns = new Map<string, Column>();
  const differences: JoinDifference[] = [];
  for (const source of sources) {
    for (const own of source.log.readings.channels) {
      const before = columns.get(own.channel.name);
      if (before === undefined) {
        columns.set(own.channel.name, { own, timeMs: source.log.readings.timeMs, n: source.n, joined: null });
      } else if (!source.fills) refuseChannelTwice(own.channel.name);
      else differences.push(join(before, own, source));
    }
  }
  const all = [...columns.values()];
  const timeMs = instantsOf(sources, all);
  const channels = all.map((column) => spread(column, timeMs));
  return {
    log: {
      readings: { timeMs, channels },
      repairs: sources.flatMap(({ log }) => log.repairs),
      passedOver: sources.flatMap(({ log }) => log.passedOver),
    },
    joined: all.flatMap(({ joined }) => joined ?? []),
    differences,
  };
}

/** A channel as the sources so far have it. */
interface Column {
  readonly own: ChannelReadings;
  readonly timeMs: Float64Array;
  readonly n: number;
  joined: JoinedReadings | null;
}

function join(column: Column, later: ChannelReadings, { n, log }: LogOfSource): JoinDifference {
  const { own, timeMs } = column;
  const earlier = column.joined ?? presentReadings(own.channel, timeMs, own.value, column.n);
  const { joined, difference } = joinChannels(
    earlier,
    presentReadings(later.channel, log.readings.timeMs, later.value, n),
    usualIntervalMs(timeMs) || usualIntervalMs(log.readings.timeMs),
  );
  column.joined = joined;
  return difference;
}

/** Every scan of the sources that are joined to none, and of the others those whose readings fill something. */
function instantsOf(sources: readonly LogOfSource[], columns: readonly Column[]): Float64Array {
  const instants = new Set<number>();
  for (const { n, log } of sources) {
    if (columns.some((column) => column.n === n)) for (const at of log.readings.timeMs) instants.add(at);
  }
  for (const { joined } of columns) for (const at of joined?.timeMs ?? []) instants.add(at);
  return Float64Array.from(instants).sort();
}

function spread({ own, timeMs, joined }: Column, instants: Float64Array): ChannelReadings {
  const from = joined ?? { channel: own.channel, timeMs, value: own.value };
  const value = new Float64Array(instants.length).fill(Number.NaN);
  let next = 0;
  instants.forEach((at, scan) => {
    if (from.timeMs[next] !== at) return;
    value[scan] = from.value[next] ?? Number.NaN;
    next += 1;
  });
  return { channel: from.channel, value };
}

function refuseChannelTwice(channel: string): never {
  throw new DomainError(
    'state-conflict',
    `Two sources of the run have a channel called "${channel}"; one of them needs another name in its layout, or is ` +
      'joined to the other as what the same instrument recorded',
    { channel },
  );
}

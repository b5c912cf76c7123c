import { DomainError } from '../errors.ts';
import type { ChannelLayout, ChannelRole } from '../log/layout.ts';
import type { Readings } from '../log/readings.ts';
import { asTemperature, scanOfEmf } from '../log/temperatures-of-emf.ts';
import { judgedChannels, type RunChannel } from './channel.ts';
import { derivedTrack, type Member, type Statistic } from './derived-track.ts';
import { GrowingRow } from './growing-row.ts';
import type { Interval } from './intervals.ts';
import type { Load } from './load.ts';
import { MedianInterval } from './median-interval.ts';
import { NeighbourWatch } from './neighbour-watch.ts';
import type { Track } from './track.ts';

const TEMPERATURE_ROLES: readonly ChannelRole[] = ['part', 'tool', 'air'];

/**
 * What happened in a run, folded forward scan by scan.
 *
 * The digest keeps the readings; crossings, extremes, window slopes, gaps and the comparisons of neighbouring sensors
 * are carried on as scans come. Judging it changes nothing in it that a later judgement could notice.
 */
export class RunDigest {
  readonly channels: readonly RunChannel[];
  readonly load: Load | null;
  readonly scanMs = new GrowingRow();
  readonly watches: readonly NeighbourWatch[];
  readonly #byColumn: readonly (RunChannel | null)[];
  readonly #asTemperatures: (figures: ArrayLike<number>) => ArrayLike<number>;
  readonly #intervals = new MedianInterval();
  readonly #derived = new Map<string, { extend(): Track }>();

  constructor(layouts: readonly ChannelLayout[], load: Load | null) {
    this.#byColumn = judgedChannels(layouts.map(asTemperature), load);
    this.#asTemperatures = scanOfEmf(layouts);
    this.channels = this.#byColumn.filter((channel) => channel !== null);
    this.load = load;
    this.watches = TEMPERATURE_ROLES.map((role) => new NeighbourWatch(this.withRole(role), this.withRole('air')));
  }

  /** Takes one scan: a figure for each column of the log, as in the file, `NaN` where absent. */
  accept(timeMs: number, figures: ArrayLike<number>): void {
    const scan = this.scanMs.length;
    const previousMs = this.scanMs.value[scan - 1];
    if (scan > 0 && !(timeMs > previousMs!)) {
      throw new DomainError('time-not-increasing', 'Scans must come in rising time', {
        timeMs,
        previousMs: previousMs!,
      });
    }
    if (scan > 0) this.#intervals.push(timeMs - previousMs!);
    this.scanMs.push(timeMs);
    const seen = this.#asTemperatures(figures);
    for (let i = 0; i < this.#byColumn.length; i++) {
      const channel = this.#byColumn[i];
      const figure = seen[i]!;
      if (channel && !Number.isNaN(figure)) channel.track.push(timeMs, channel.judgedReading(figure), scan);
    }
    for (const watch of this.watches) watch.accept(timeMs, scan);
  }

  /** First to last scan. */
  get log(): Interval {
    return { from: this.scanMs.value[0]!, until: this.scanMs.value[this.scanMs.length - 1]! };
  }

  medianIntervalMs(): number | null {
    return this.#intervals.medianMs();
  }

  withRole(role: ChannelRole): RunChannel[] {
    return this.channels.filter(({ layout }) => layout.role === role);
  }

  /** A track worked out from several, at the scans where each of them that still counts has a reading. */
  derived(statistic: Statistic, members: readonly Member[]): Track {
    const key = `${statistic} ${members.map(({ track, untilMs }) => `${track.name}@${untilMs}`).join('|')}`;
    let derived = this.#derived.get(key);
    if (derived === undefined) {
      derived = derivedTrack(statistic, members, this.scanMs);
      this.#derived.set(key, derived);
    }
    return derived.extend();
  }
}

/** An empty digest of a run that is about to be read. */
export function beginRun(channels: readonly ChannelLayout[], load: Load | null): RunDigest {
  return new RunDigest(channels, load);
}

/** The digest of a whole log. */
export function foldReadings(readings: Readings, load: Load | null): RunDigest {
  const digest = beginRun(
    readings.channels.map(({ channel }) => channel),
    load,
  );
  const figures = new Float64Array(readings.channels.length);
  for (let scan = 0; scan < readings.timeMs.length; scan++) {
    for (let i = 0; i < figures.length; i++) figures[i] = readings.channels[i]!.value[scan]!;
    digest.accept(readings.timeMs[scan]!, figures);
  }
  return digest;
}

import { DomainError } from '../errors.ts';
import type { ChannelLayout } from './layout.ts';
import { scaledReading } from './readings.ts';

/** The readings of one channel that are there, each with the source it is from. */
export interface JoinedReadings {
  readonly channel: ChannelLayout;
  /** [n], ms since 1970-01-01T00:00:00Z, strictly rising. */
  readonly timeMs: Float64Array;
  /** [n], figures as `channel` scales them. */
  readonly value: Float64Array;
  /** [n], number of the source that read it. */
  readonly source: Uint16Array;
}

/** What two sources say of one channel where both read it, in the channel's unit. */
export interface JoinDifference {
  readonly channel: string;
  readonly unit: string;
  readonly source: number;
  /** Readings of the later source that fell where the earlier ones read. */
  readonly compared: number;
  /** Those further from the earlier ones than the uncertainties of both together; where one is not known, than 0. */
  readonly differing: number;
  readonly toleranceOfBoth: number | null;
  /** The largest difference, later less earlier, and its instant; null where nothing was compared. */
  readonly largest: { readonly difference: number; readonly atMs: number } | null;
}

/** Present readings further apart than so many usual intervals leave a gap that another source may fill. */
const INTERVALS_OF_A_GAP = 2.5;

/**
 * One channel of what an earlier and a later source read of it.
 *
 * The later one speaks where the earlier has a gap: where its readings before and after are more than 2.5 of its usual
 * intervals apart, or there are none on one side. Between a reading of one and one of the other lies at least half the
 * usual interval, so that two instruments' disagreement does not become a steep rate. Where both read, the later is
 * compared with the earlier, read linearly between its readings, and the earlier stays.
 *
 * @param earlier     What is known of the channel; its sources came first.
 * @param later       One source's readings of it; same role and unit.
 * @param intervalMs  Usual interval of the earlier source's scans, ms; > 0.
 * @throws {DomainError} `state-conflict` when role or unit are not the same.
 */
export function joinChannels(
  earlier: JoinedReadings,
  later: JoinedReadings,
  intervalMs: number,
): { readonly joined: JoinedReadings; readonly difference: JoinDifference } {
  refuseOtherMeaning(earlier.channel, later.channel);
  const [own, other, channel] = inOneScale(earlier, later);
  const filling: number[] = [];
  const compared: { difference: number; atMs: number }[] = [];
  let next = 0;
  for (let i = 0; i < other.timeMs.length; i++) {
    const atMs = other.timeMs[i]!;
    while (next < own.timeMs.length && own.timeMs[next]! < atMs) next++;
    const beforeMs = next === 0 ? -Infinity : own.timeMs[next - 1]!;
    const afterMs = next === own.timeMs.length ? Infinity : own.timeMs[next]!;
    if (afterMs === atMs || afterMs - beforeMs <= INTERVALS_OF_A_GAP * intervalMs) {
      compared.push({ difference: readingAt(other, i) - readBetween(own, next, atMs), atMs });
    } else if (atMs - beforeMs >= intervalMs / 2 && afterMs - atMs >= intervalMs / 2) filling.push(i);
  }
  return { joined: merged(own, other, filling, channel), difference: differenceOf(earlier, later, compared) };
}

/** The middle interval of scans, ms; 0 of fewer than two. */
export function usualIntervalMs(timeMs: Float64Array): number {
  if (timeMs.length < 2) return 0;
  const intervals = timeMs.subarray(1).map((at, n) => at - timeMs[n]!);
  return intervals.sort()[Math.floor(intervals.length / 2)]!;
}

/** The readings of a column that are there. */
export function presentReadings(
  channel: ChannelLayout,
  timeMs: Float64Array,
  value: Float64Array,
  source: number,
): JoinedReadings {
  const isPresent = (_: number, n: number) => !Number.isNaN(value[n]!);
  const present = value.filter((figure) => !Number.isNaN(figure));
  return {
    channel,
    timeMs: timeMs.filter(isPresent),
    value: present,
    source: new Uint16Array(present.length).fill(source),
  };
}

function refuseOtherMeaning(earlier: ChannelLayout, later: ChannelLayout): void {
  if (earlier.role === later.role && earlier.unit === later.unit) return;
  throw new DomainError(
    'state-conflict',
    `"${later.name}" is ${earlier.role} in ${earlier.unit} in one source and ${later.role} in ${later.unit} in ` +
      'another; a channel that is to be joined needs one role and one unit, which a scale and an offset can give it',
    { channel: later.name },
  );
}

/** Both in one scale: as they came where that is the same, otherwise in the unit. Unknown uncertainty stays unknown. */
function inOneScale(
  earlier: JoinedReadings,
  later: JoinedReadings,
): readonly [JoinedReadings, JoinedReadings, ChannelLayout] {
  const { uncertainty: _uncertainty, ...rest } = earlier.channel;
  const both = bothUncertainties(earlier.channel, later.channel);
  const uncertainty = both === null ? {} : { uncertainty: Math.max(...both) };
  const isSame =
    (earlier.channel.scale ?? 1) === (later.channel.scale ?? 1) &&
    (earlier.channel.offset ?? 0) === (later.channel.offset ?? 0);
  if (isSame) return [earlier, later, { ...rest, ...uncertainty }];
  const { scale: _scale, offset: _offset, ...unscaled } = rest;
  return [inUnit(earlier), inUnit(later), { ...unscaled, ...uncertainty }];
}

function inUnit({ channel, timeMs, value, source }: JoinedReadings): JoinedReadings {
  const { scale: _scale, offset: _offset, ...unscaled } = channel;
  return { channel: unscaled, timeMs, value: value.map((figure) => scaledReading(figure, channel)), source };
}

function readingAt({ channel, value }: JoinedReadings, n: number): number {
  return scaledReading(value[n]!, channel);
}

function readBetween(readings: JoinedReadings, next: number, atMs: number): number {
  const afterMs = readings.timeMs[next]!;
  const after = readingAt(readings, next);
  if (afterMs === atMs) return after;
  const beforeMs = readings.timeMs[next - 1]!;
  const before = readingAt(readings, next - 1);
  return before + ((after - before) * (atMs - beforeMs)) / (afterMs - beforeMs);
}

function merged(own: JoinedReadings, other: JoinedReadings, filling: number[], channel: ChannelLayout): JoinedReadings {
  const length = own.timeMs.length + filling.length;
  const joined = {
    channel,
    timeMs: new Float64Array(length),
    value: new Float64Array(length),
    source: new Uint16Array(length),
  };
  let i = 0;
  let k = 0;
  for (let n = 0; n < length; n++) {
    const takesOther = i === own.timeMs.length || (k < filling.length && other.timeMs[filling[k]!]! < own.timeMs[i]!);
    const [from, at] = takesOther ? [other, filling[k++]!] : [own, i++];
    joined.timeMs[n] = from.timeMs[at]!;
    joined.value[n] = from.value[at]!;
    joined.source[n] = from.source[at]!;
  }
  return joined;
}

function differenceOf(
  earlier: JoinedReadings,
  later: JoinedReadings,
  compared: readonly { readonly difference: number; readonly atMs: number }[],
): JoinDifference {
  const both = bothUncertainties(earlier.channel, later.channel);
  const toleranceOfBoth = both === null ? null : both[0] + both[1];
  const size = ({ difference }: { readonly difference: number }) => Math.abs(difference);
  return {
    channel: later.channel.name,
    unit: later.channel.unit,
    source: later.source[0] ?? 0,
    compared: compared.length,
    differing: compared.filter((one) => size(one) > (toleranceOfBoth ?? 0) + ROUNDING).length,
    toleranceOfBoth,
    largest: compared.reduce<JoinDifference['largest']>(
      (largest, one) => (largest === null || size(one) > size(largest) ? one : largest),
      null,
    ),
  };
}

/** What interpolation in binary adds to a difference of decimals. */
const ROUNDING = 1e-9;

function bothUncertainties(a: ChannelLayout, b: ChannelLayout): readonly [number, number] | null {
  return a.uncertainty === undefined || b.uncertainty === undefined ? null : [a.uncertainty, b.uncertainty];
}

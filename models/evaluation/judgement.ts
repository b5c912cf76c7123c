import type { Resin } from '../cure/resin.ts';
import type { Cycle } from '../cycle/cycle.ts';
import type { MaterialRecords } from '../material/ledger.ts';
import type { RunChannel } from '../run/channel.ts';
import type { RunDigest } from '../run/digest.ts';
import { type Gap, gapsOf } from '../run/gaps.ts';
import type { InstrumentRecords } from '../run/instrument-records.ts';
import type { Interval } from '../run/intervals.ts';
import type { LoadPart } from '../run/load.ts';
import { celsiusDifferenceFrom, type TemperatureUnit } from '../units.ts';

/** A thermocouple a part is judged by, believed until its exclusion. */
export interface JudgedSensor {
  readonly name: string;
  readonly channel: RunChannel;
  readonly track: RunChannel['track'];
  /** The instant of its exclusion; `Infinity`: none. */
  readonly untilMs: number;
  /** Its last reading that counts; `-Infinity`: none. */
  readonly lastMs: number;
  /** Expanded uncertainty in °C; 0 where unknown: then it is judged as indicated. */
  readonly uncertaintyC: number;
  readonly gaps: readonly Gap[];
}

/** Whether a person decided not to believe the sensor from some instant on. */
export function isExcluded(s: JudgedSensor): boolean {
  return s.untilMs !== Number.POSITIVE_INFINITY;
}

/** Where belief in an excluded sensor ends: at its last reading, or at the exclusion where that fell into a gap. */
export function believedUntil({ longestGapMs }: Judgement, { lastMs, untilMs }: JudgedSensor): number {
  return untilMs - lastMs <= longestGapMs ? lastMs : untilMs;
}

/** Whether a sensor is left that is believed to the end. */
export function someBelieved({ sensors }: Judgement): boolean {
  return sensors.some((s) => !isExcluded(s));
}

/**
 * The gaps that leave a limit open. While a run goes on, a sensor that is silent just now may still come back: its
 * missing end is what the limit waits for, not yet a gap in it.
 */
export function openingGaps({ isOpen }: Judgement, gaps: readonly Gap[]): readonly Gap[] {
  return isOpen ? gaps.filter(({ after }) => after !== null) : gaps;
}

/** Everything the limits of one part look at, under one set of exclusions. */
export interface Judgement {
  readonly digest: RunDigest;
  readonly cycle: Cycle;
  readonly part: LoadPart | null;
  readonly resin: Resin | null;
  /** What the parts were laid up from; null where nothing of it is on record. */
  readonly materials: MaterialRecords | null;
  /** What the channels were read by; null where nothing of it is on record. */
  readonly instruments: InstrumentRecords | null;
  readonly log: Interval;
  /** The run goes on: what has not ended is pending. */
  readonly isOpen: boolean;
  readonly longestGapMs: number;
  /** In °C per ms. */
  readonly changesAtMost: number;
  /** Pa; null where not recorded. */
  readonly barometerPa: number | null;
  readonly sensors: readonly JudgedSensor[];
  readonly air: readonly JudgedSensor[];
  readonly ownSensors: boolean;
}

/** How long a stretch without readings may be before it is a gap: as written, or 5 median intervals, 60 s at least. */
export function longestGapMs(cycle: Cycle, digest: RunDigest): number {
  const written = cycle.log?.longestGap;
  if (written !== undefined) return written * 60_000;
  return Math.max(5 * (digest.medianIntervalMs() ?? 0), 60_000);
}

/** °C per ms. */
export function changesAtMost(cycle: Cycle): number {
  const unit = cycle.units.temperature;
  const written = cycle.log?.changesAtMost ?? inUnit(unit, 20, 36);
  return celsiusDifferenceFrom(written, unit) / 60_000;
}

/** A figure of the rules that is given for both units. */
export function inUnit(unit: TemperatureUnit, forCelsius: number, forFahrenheit: number): number {
  return unit === '°C' ? forCelsius : forFahrenheit;
}

/** The figures of the rules, in °C, for a cycle written in one unit. */
export interface RuleFigures {
  /** Rise of the leading sensor that is heat-on: 5 °C, 9 °F. */
  readonly heatOnC: number;
  /** Fall below the hottest that shows the cooling: 15 °C, 27 °F. */
  readonly coolingC: number;
}

/** The figures of the rules for a cycle's temperature unit. */
export function ruleFigures(unit: TemperatureUnit): RuleFigures {
  return {
    heatOnC: celsiusDifferenceFrom(inUnit(unit, 5, 9), unit),
    coolingC: celsiusDifferenceFrom(inUnit(unit, 15, 27), unit),
  };
}

/** A channel as a judged sensor, believed until an instant. */
export function judgedSensor(
  channel: RunChannel,
  digest: RunDigest,
  untilMs: number,
  gapMs: number,
  isGuarded: boolean,
): JudgedSensor {
  const { track } = channel;
  const whole = gapsOf(track, gapMs, digest.log);
  const last = track.indexFrom(untilMs) - 1;
  const gaps = whole
    .filter((gap) => gap.from < untilMs)
    .map((gap) => (gap.until > untilMs ? { ...gap, until: untilMs, after: null } : gap))
    // An exclusion ends a sensor's gap: what is left of it may be too short to be one.
    .filter((gap) => gap.until < untilMs || gap.before === null || gap.until - gap.from > gapMs);
  const uncertaintyC = isGuarded ? (channel.uncertainty ?? 0) : 0;
  const lastMs = last < 0 ? Number.NEGATIVE_INFINITY : track.timeMs(last);
  return { name: channel.layout.name, channel, track, untilMs, lastMs, uncertaintyC, gaps };
}

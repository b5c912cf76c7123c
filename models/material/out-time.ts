import { celsiusFrom } from '../units.ts';
import { type AgeingRate, ageingRate } from './ageing-rate.ts';
import type { Course } from './course.ts';
import { dayOf, durationWords } from './ledger-order.ts';
import type { Material } from './material.ts';
import { timeAbove } from './profile.ts';
import type { Stay } from './stays.ts';

/** Minutes of out-life used: no fewer than `least`, no more than `most`; `Infinity` where nothing bounds them. */
export interface OutTime {
  readonly least: number;
  readonly most: number;
  /** What stands between the two, as sentences without their stop. */
  readonly unknown: readonly string[];
}

/**
 * Out-life used along a course.
 *
 * @returns `least` ≤ `most`; both grow with the course.
 *
 * Accuracy: a stay in one room exactly; a freezer's record by Simpson's rule, see {@link timeAbove}.
 * Limits: what was not recorded widens the two, it is never filled in.
 */
export function outTime(course: Course, material: Material): OutTime {
  const rate = ageingRate(material);
  const all = course.stays.map((stay) => stayTime(stay, course.item, material, rate));
  return {
    least: all.reduce((sum, { least }) => sum + least, course.statedMinutes),
    most: all.reduce((sum, { most }) => sum + most, course.statedMinutes),
    unknown: [...new Set(all.flatMap(({ unknown }) => unknown))],
  };
}

const NONE: OutTime = { least: 0, most: 0, unknown: [] };

function stayTime(stay: Stay, item: string, material: Material, rate: AgeingRate): OutTime {
  switch (stay.kind) {
    case 'frozen':
      return NONE;
    case 'unknown':
      return { least: 0, most: Number.POSITIVE_INFINITY, unknown: [stay.because] };
    case 'freezer-record':
      return freezerTime(stay, item, material, rate);
    default:
      return roomTime(stay, material, rate);
  }
}

function roomTime(stay: Stay & { kind: 'out' }, material: Material, rate: AgeingRate): OutTime {
  const { thaw, out, units } = material;
  const waits = thaw?.from === 'temperature' && stay.beganFrozen;
  if (waits && stay.thawedMs === null) {
    const whole = timeIn(stay, stay.fromMs, material, rate);
    if (whole.most === 0) return NONE;
    const because = `when it had warmed to ${thaw.above} ${units.temperature} is not on record (out on ${dayOf(stay.fromMs)})`;
    return { ...whole, least: 0, unknown: [...whole.unknown, because] };
  }
  const fromMs = waits ? Math.max(stay.fromMs, stay.thawedMs ?? 0) : stay.fromMs;
  return fromMs >= stay.untilMs ? NONE : timeIn(stay, fromMs, { ...material, out }, rate);
}

function timeIn(stay: Stay & { kind: 'out' }, fromMs: number, { out, units }: Material, rate: AgeingRate): OutTime {
  const minutes = (stay.untilMs - fromMs) / 60_000;
  if (minutes === 0) return NONE;
  const { temperature, unit = units.temperature, humidity } = stay.room ?? {};
  const stretch = `for ${durationWords(minutes)} from ${dayOf(fromMs)}`;
  const open = (least: number, because: string): OutTime => ({
    least,
    most: Number.POSITIVE_INFINITY,
    unknown: [because],
  });
  if (temperature === undefined) {
    return open(minutes * rate.least, `the temperature of the room is not on record ${stretch}`);
  }
  const temperatureC = celsiusFrom(temperature, unit);
  const factor = rate.at(temperatureC);
  if (factor === null) {
    const stated = `its out-life is stated at up to ${out.atMost} ${units.temperature}`;
    const counted = minutes * (rate.at(rate.atMostC) ?? 1);
    return open(counted, `the room was at ${temperature} ${unit} ${stretch}; ${stated} and no rule reaches so far`);
  }
  if (out.humidityAtMost !== undefined) {
    if (humidity === undefined) return open(minutes * factor, `the humidity of the room is not on record ${stretch}`);
    if (humidity > out.humidityAtMost) {
      return open(
        minutes * factor,
        `the room was at ${humidity} % RH ${stretch}; its out-life is stated at up to ${out.humidityAtMost} % RH`,
      );
    }
  }
  return { least: minutes * factor, most: minutes * factor, unknown: [] };
}

function freezerTime(
  { fromMs, untilMs, profile }: Stay & { kind: 'freezer-record' },
  item: string,
  { storage, units }: Material,
  rate: AgeingRate,
): OutTime {
  const outAbove = storage.outAbove ?? storage.atMost;
  const aboveC = celsiusFrom(outAbove, units.temperature);
  const above = timeAbove(profile, fromMs, untilMs, aboveC, rate);
  const unknown: string[] = [];
  if (above.beyondMinutes > 0) {
    unknown.push(
      `the freezer was warmer than any rule reaches for ${durationWords(above.beyondMinutes)} on ${dayOf(fromMs)}`,
    );
  }
  // A record that begins or ends warm says nothing of how long it was so before and after.
  const [first, last] = [profile[0]!, profile.at(-1)!];
  if ((first[0] === fromMs && first[1] > aboveC) || (last[0] === untilMs && last[1] > aboveC)) {
    unknown.push(
      `the freezer's record of ${dayOf(fromMs)} begins or ends warmer than ${outAbove} ${units.temperature}, so how long ${item} lay warm is not known`,
    );
  }
  return {
    least: above.minutes,
    most: unknown.length === 0 ? above.minutes : Number.POSITIVE_INFINITY,
    unknown,
  };
}

import type { PartEvaluation, SensorState } from '../../models/evaluation/evaluation.ts';
import type { Readings } from '../../models/log/readings.ts';
import { judgedChannels } from '../../models/run/channel.ts';
import type { Load } from '../../models/run/load.ts';
import { type NumberName, timeInDwell } from '../../models/trace/known-factors.ts';

/** One run as one of its parts went through it. */
export interface PartCure {
  readonly readings: Readings;
  readonly load: Load;
  readonly part: PartEvaluation;
  readonly sensors: readonly SensorState[];
}

/** A judged channel of a part: °C or Pa scan by scan, NaN where absent or no longer believed. */
export interface JudgedCourse {
  readonly channel: string;
  readonly role: 'temperature' | 'pressure' | 'vacuum';
  readonly values: Float64Array;
}

/** Readings of the part's judged sensors, of its bag line and of the vessel's pressure, as they were judged. */
export function coursesOf({ readings, load, part, sensors }: PartCure): JudgedCourse[] {
  const channels = judgedChannels(
    readings.channels.map(({ channel }) => channel),
    load,
  );
  return readings.channels.flatMap(({ channel, value }, n): JudgedCourse[] => {
    const judged = channels[n];
    if (!judged) return [];
    const { role } = channel;
    const isOwn = judged.parts.length === 0 || judged.parts.includes(part.part ?? '');
    const isWanted = role === 'pressure' || role === 'vacuum' ? isOwn : part.judgedBy.includes(channel.name);
    if (!isWanted) return [];
    const exclusion = sensors.find((sensor) => sensor.channel === channel.name)?.exclusion ?? null;
    const believedUntilMs = exclusion === null ? Number.POSITIVE_INFINITY : Date.parse(exclusion.from);
    const values = value.map((figure, i) =>
      (readings.timeMs[i] ?? 0) < believedUntilMs ? judged.judgedReading(figure) : Number.NaN,
    );
    return [{ channel: channel.name, role: role === 'pressure' || role === 'vacuum' ? role : 'temperature', values }];
  });
}

const PA_PER_BAR = 1e5;

/** When the vacuum, after its most, first fell to half of that; null where it never did. */
export function ventMs(timeMs: Float64Array, vacuum: Float64Array | null): number | null {
  if (vacuum === null) return null;
  let [most, at] = [0, -1];
  for (const [i, value] of vacuum.entries()) if (value > most) [most, at] = [value, i];
  if (at < 0) return null;
  for (let i = at; i < vacuum.length; i += 1) if ((vacuum[i] ?? Number.NaN) <= most / 2) return timeMs[i] ?? null;
  return null;
}

/** What the readings and the judgement of a run say of one part's cure, by the names of the known factors. */
export function featuresOfCure(cure: PartCure): Partial<Record<NumberName, number>> & Record<string, number> {
  const { part, readings } = cure;
  const found: Record<string, number> = {};
  const keep = (name: NumberName, figure: number | null) => {
    if (figure !== null && Number.isFinite(figure)) found[name] = figure;
  };
  const courses = coursesOf(cure);
  const temperatures = courses.filter(({ role }) => role === 'temperature').map(({ values }) => values);
  const dwells = part.stages.filter(({ kind }) => kind === 'dwell');
  const heatOnMs = msOf(part.heatOn);
  const opensMs = msOf(dwells[0]?.opens ?? null);
  const gelMs = Math.min(...part.cure.map(({ gelAt }) => msOf(gelAt) ?? Number.POSITIVE_INFINITY));
  const at = (ms: number | null) => (ms === null || !Number.isFinite(ms) ? -1 : scanAt(readings.timeMs, ms));
  const [heatOn, opens, gel] = [at(heatOnMs), at(opensMs), at(gelMs)];
  if (heatOn >= 0 && opens > heatOn) {
    const minutes = ((readings.timeMs[opens] ?? 0) - (readings.timeMs[heatOn] ?? 0)) / 60_000;
    keep('heating rate', (meanAt(temperatures, opens) - meanAt(temperatures, heatOn)) / minutes);
    keep('lag spread', widest(temperatures, heatOn, opens));
  }
  keep('entry difference', entryDifference(dwells[0]?.sensors ?? []));
  keep('peak temperature', greatest(temperatures));
  const vacuum = courses.filter(({ role }) => role === 'vacuum').map(({ values }) => values);
  if (heatOn >= 0) {
    keep('vacuum at heat-on', meanAt(vacuum, heatOn) / PA_PER_BAR);
    // Many cycles vent the bag once the vessel presses; what it reads from then on says nothing of the bag.
    const vented = at(ventMs(readings.timeMs, vacuum[0] ?? null));
    const until = vented > heatOn && vented < gel ? vented : gel;
    if (until > heatOn) keep('vacuum before gel', meanBetween(vacuum, readings.timeMs, heatOn, until) / PA_PER_BAR);
  }
  const pressure = courses.filter(({ role }) => role === 'pressure').map(({ values }) => values);
  if (gel >= 0) keep('pressure at gel', meanAt(pressure, gel) / PA_PER_BAR);
  keep('estimated degree of cure', least(part.cure.map(({ degree }) => degree)));
  keep('estimated Tg', least(part.cure.flatMap(({ tgC }) => (tgC === null ? [] : [tgC]))));
  for (const { name, minutes } of dwells) if (minutes !== null) found[timeInDwell(name)] = minutes;
  return found;
}

function msOf(instant: string | null): number | null {
  return instant === null ? null : Date.parse(instant);
}

/** The first scan at or after an instant; −1 where the log ends before. */
function scanAt(timeMs: Float64Array, ms: number): number {
  return timeMs.findIndex((at) => at >= ms);
}

/** Mean of those that read something in a scan; NaN where none does. */
function meanAt(courses: readonly Float64Array[], scan: number): number {
  const present = courses.map((values) => values[scan] ?? Number.NaN).filter((value) => !Number.isNaN(value));
  return present.length === 0 ? Number.NaN : present.reduce((sum, value) => sum + value, 0) / present.length;
}

/** Mean over time, by the trapezoid, of what is present. */
function meanBetween(courses: readonly Float64Array[], timeMs: Float64Array, from: number, until: number): number {
  let [area, span] = [0, 0];
  for (let i = from + 1; i <= until; i += 1) {
    const middle = (meanAt(courses, i - 1) + meanAt(courses, i)) / 2;
    const width = (timeMs[i] ?? 0) - (timeMs[i - 1] ?? 0);
    if (Number.isNaN(middle)) continue;
    area += middle * width;
    span += width;
  }
  return area / span;
}

/** The most that hottest and coldest were apart in one scan; null with fewer than two sensors. */
function widest(courses: readonly Float64Array[], from: number, until: number): number | null {
  let most: number | null = null;
  for (let i = from; i <= until; i += 1) {
    const present = courses.map((values) => values[i] ?? Number.NaN).filter((value) => !Number.isNaN(value));
    if (present.length > 1) most = Math.max(most ?? 0, Math.max(...present) - Math.min(...present));
  }
  return most;
}

function entryDifference(sensors: readonly { readonly entered: string | null }[]): number | null {
  const entered = sensors.map((sensor) => msOf(sensor.entered));
  if (entered.length < 2 || entered.includes(null)) return null;
  const all = entered as number[];
  return (Math.max(...all) - Math.min(...all)) / 60_000;
}

function greatest(courses: readonly Float64Array[]): number | null {
  let most = Number.NEGATIVE_INFINITY;
  for (const values of courses) for (const value of values) if (value > most) most = value;
  return Number.isFinite(most) ? most : null;
}

function least(figures: readonly number[]): number | null {
  return figures.length === 0 ? null : Math.min(...figures);
}

import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Load } from '../../models/run/load.ts';
import { celsiusFrom, isTemperatureUnit } from '../../models/units.ts';
import type { DoorCheck, LiveReading, SourceLine } from '../contract/live.ts';

/** Sensors of a vessel at ambient agree where each lies within this of the median of the others; common practice. */
const AGREE_WITHIN_C = 5;
/** Above this a vessel is still warm from the run before, and its sensors need not agree. From memory. */
const AMBIENT_AT_MOST_C = 40;

export function sourcesSending(sources: readonly SourceLine[]): DoorCheck {
  const check = 'sources-sending';
  const listened = sources.filter(({ state }) => state !== 'resting');
  if (listened.length === 0) {
    return { check, outcome: 'not-on-record', because: 'Nothing is set up to send readings from this vessel.' };
  }
  const quiet = listened.filter(({ state }) => state !== 'sending');
  if (quiet.length === 0) {
    return { check, outcome: 'in-order', because: `${listened.map(({ name }) => name).join(', ')}: readings arrive.` };
  }
  const told = quiet.map(({ name, because }) => (because === null ? `${name} sends nothing` : `${name}: ${because}`));
  return { check, outcome: 'not-in-order', because: `${told.join('; ').replace(/\.$/, '')}.` };
}

/** Whether the latest readings of the thermocouples lie together, as they should before any heat. */
export function sensorsAgree(readings: readonly LiveReading[]): DoorCheck {
  const check = 'sensors-agree';
  const now = readings.flatMap(({ channel, role, unit, value, isStale }) =>
    ['part', 'tool', 'air'].includes(role) && isTemperatureUnit(unit) && value !== null && !isStale
      ? [{ channel, valueC: celsiusFrom(value, unit) }]
      : [],
  );
  if (now.length < 3) {
    const because = `Three thermocouples or more are compared with one another; ${now.length} of this vessel read now.`;
    return { check, outcome: 'not-on-record', because };
  }
  const middleC = median(now.map(({ valueC }) => valueC));
  if (middleC > AMBIENT_AT_MOST_C) {
    const because = `The vessel stands at ${middleC.toFixed(0)} °C; sensors are compared at ambient, below ${AMBIENT_AT_MOST_C} °C.`;
    return { check, outcome: 'not-on-record', because };
  }
  const off = now.flatMap((one) => {
    const othersC = median(now.filter((other) => other !== one).map(({ valueC }) => valueC));
    return Math.abs(one.valueC - othersC) > AGREE_WITHIN_C
      ? [`${one.channel} reads ${one.valueC.toFixed(1)} °C, the others ${othersC.toFixed(1)} °C`]
      : [];
  });
  if (off.length > 0) return { check, outcome: 'not-in-order', because: `${off.join('; ')}.` };
  const all = `${now.length} thermocouples read within ${AGREE_WITHIN_C} °C of one another, about ${middleC.toFixed(0)} °C`;
  return { check, outcome: 'in-order', because: `${all}.` };
}

/** Sensors of the role the cycle judges by: as many as it asks for, one on each part where it asks, its places named. */
export function enoughSensors(cycle: Cycle, load: Load | null, readings: readonly LiveReading[]): DoorCheck[] {
  const { workingAtLeast = 1, own = false, mustWork = [] } = cycle.sensors ?? {};
  const working = readings
    .filter(({ role, value, isStale }) => role === cycle.judgedBy && value !== null && !isStale)
    .map(({ channel }) => channel);
  const told: DoorCheck[] = [];
  const check = 'enough-sensors';
  const parts = load?.parts ?? [];
  const named = new Set(
    (load?.sensors ?? []).flatMap(({ channel, parts: on = [] }) => (working.includes(channel) ? on : [])),
  );
  const bare = own ? parts.filter(({ part }) => !named.has(part)).map(({ part }) => part) : [];
  if (working.length < workingAtLeast) {
    const because = `${count(working.length, cycle.judgedBy)} now; the cycle asks for at least ${workingAtLeast}.`;
    told.push({ check, outcome: 'not-in-order', because });
  } else if (bare.length > 0) {
    told.push({ check, outcome: 'not-in-order', because: `No working sensor of their own: ${bare.join(', ')}.` });
  } else if (own && parts.length === 0) {
    told.push({
      check,
      outcome: 'not-on-record',
      because: 'The cycle asks for a sensor on each part; no part is named yet.',
    });
  } else {
    told.push({ check, outcome: 'in-order', because: `${count(working.length, cycle.judgedBy)} now.` });
  }
  if (mustWork.length > 0) {
    const missing = mustWork.filter((place) => !(load?.sensors ?? []).some((sensor) => sensor.place === place));
    told.push(
      missing.length === 0
        ? { check: 'places-named', outcome: 'in-order', because: `Each has its sensor: ${mustWork.join(', ')}.` }
        : {
            check: 'places-named',
            outcome: 'not-on-record',
            because: `No sensor is named for: ${missing.join(', ')}.`,
          },
    );
  }
  return told;
}

function count(n: number, role: string): string {
  return n === 1 ? `1 ${role} sensor reads` : `${n} ${role} sensors read`;
}

function median(figures: readonly number[]): number {
  const sorted = figures.toSorted((a, b) => a - b);
  const middle = sorted.length / 2;
  return ((sorted[Math.ceil(middle) - 1] ?? Number.NaN) + (sorted[Math.floor(middle)] ?? Number.NaN)) / 2;
}

import { format, listOf, number, object, pairOf, type Read, refuse, refuseNamedTwice, text } from '../document.ts';
import { DomainError } from '../errors.ts';
import { PA_PER_UNIT } from '../units.ts';
import type { Exclusion, LeakTestRecord, Load, LoadPart, LoadSensor } from './load.ts';

/** Reads a load document; an unknown, missing or contradictory key is refused by its path. */
export function parseLoad(document: unknown): Load {
  const load = readLoad(document, '');
  refuseNamedTwice(
    load.parts.map(({ part }) => part),
    (i) => `parts[${i}].part`,
  );
  refuseNamedTwice(
    load.sensors.map(({ channel }) => channel),
    (i) => `sensors[${i}].channel`,
  );
  checkSensorParts(load);
  return load;
}

/**
 * Reads `CHANNEL@INSTANT:REASON (NAME)`, a person's decision that a sensor is not to be believed from an instant on.
 *
 * A decision nobody answers for is no decision: without a name in brackets it is refused.
 */
export function parseExclusion(words: string): Exclusion {
  const [, channel, from, reason, by] = EXCLUSION.exec(words) ?? [];
  if (channel === undefined || from === undefined || reason === undefined || by === undefined) {
    return malformed(
      words,
      'CHANNEL@INSTANT:REASON (NAME), the instant with Z or an offset, the name of who decided it',
    );
  }
  if (!isInstant(from)) return malformed(words, `an instant; "${from}" is none`);
  return { channel, from, reason, by };
}

/** Reads a barometer's figure with its unit (`1009 mbar`) in Pa. */
export function parseBarometer(words: string): number {
  const [, figure, unit] = /^\s*(\d+(?:\.\d+)?)\s*(\S+?)(?: abs)?\s*$/.exec(words) ?? [];
  if (figure === undefined || unit === undefined || !Object.hasOwn(PA_PER_UNIT, unit)) {
    throw new DomainError(
      'barometer-malformed',
      `"${words}" is no ambient pressure; expected one such as "1009 mbar"`,
      {
        barometer: words,
      },
    );
  }
  const pressurePa = Math.round(Number(figure) * PA_PER_UNIT[unit]! * 1e6) / 1e6;
  if (pressurePa < LEAST_AMBIENT_PA || pressurePa > GREATEST_AMBIENT_PA) {
    throw new DomainError(
      'barometer-malformed',
      `"${words}" is ${Math.round(pressurePa / 100)} mbar; a barometer reads between 300 and 1100 mbar where people work`,
      { barometer: words, pressurePa },
    );
  }
  return pressurePa;
}

// The summit of Everest has some 330 mbar; the highest pressure recorded at sea level is 1085 mbar (WMO archive of
// weather and climate extremes; both from memory). Outside, the unit or the figure is wrong.
const LEAST_AMBIENT_PA = 30_000;
const GREATEST_AMBIENT_PA = 110_000;

const EXCLUSION = /^\s*([^@]*[^@\s])\s*@\s*([^\s@]+?(?:Z|[+-]\d\d:\d\d))\s*:\s*(\S.*?)\s*\(\s*([^()]*[^()\s])\s*\)\s*$/;

function malformed(words: string, expected: string): never {
  throw new DomainError(
    'exclusion-malformed',
    `"${words}" cannot be read as an exclusion: expected ${expected}, as in "TC4@2026-03-02T10:22:00Z:open circuit (inspector 2)"`,
    { exclusion: words },
  );
}

const ISO_INSTANT = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})(?::(\d{2})(?:\.\d{1,9})?)?(?:Z|[+-]\d{2}:\d{2})$/;

function isInstant(words: string): boolean {
  const [, year, month, day] = ISO_INSTANT.exec(words) ?? [];
  if (year === undefined || Number.isNaN(Date.parse(words))) return false;
  // Date.parse rolls 31 April over into May.
  const date = new Date(Date.UTC(Number(year), Number(month) - 1, Number(day)));
  return date.getUTCMonth() === Number(month) - 1 && date.getUTCDate() === Number(day);
}

const instant: Read<string> = (value, path) =>
  typeof value === 'string' && isInstant(value)
    ? value
    : refuse(path, 'an ISO 8601 instant with Z or an offset, such as "2026-03-02T10:22:00Z"', value);

const leakTest: Read<LeakTestRecord> = object((fields) => ({
  start: fields.required('start', number({ atLeast: 0 })),
  end: fields.required('end', number({ atLeast: 0 })),
  minutes: fields.required('minutes', number({ above: 0 })),
}));

const part: Read<LoadPart> = object((fields) => ({
  part: fields.required('part', text),
  ...fields.optional('quantity', number({ atLeast: 1, whole: true })),
  ...fields.optional('bagLine', text),
  ...fields.optional('startDegree', number({ atLeast: 0, below: 1 })),
  ...fields.optional('humidity', number({ above: 0, atMost: 100 })),
  ...fields.optional('leakTest', leakTest),
}));

const corrections: Read<readonly (readonly [number, number])[]> = (value, path) => {
  const points = listOf(pairOf(number()), { atLeast: 1 })(value, path);
  for (const [i, point] of points.entries()) {
    const before = points[i - 1];
    if (before !== undefined && point[0] <= before[0]) {
      refuse(`${path}[${i}]`, `a reading above ${before[0]}, that of the point before`, point);
    }
  }
  return points;
};

const sensor: Read<LoadSensor> = object((fields) => ({
  channel: fields.required('channel', text),
  ...fields.optional('parts', (value, path) => {
    const names = listOf(text)(value, path);
    refuseNamedTwice(names, (i) => `${path}[${i}]`);
    return names;
  }),
  ...fields.optional('place', text),
  ...fields.optional('uncertainty', number({ above: 0 })),
  ...fields.optional('corrections', corrections),
}));

const exclusion: Read<Exclusion> = object((fields) => ({
  channel: fields.required('channel', text),
  from: fields.required('from', instant),
  reason: fields.required('reason', text),
  by: fields.required('by', text),
}));

const barometer: Read<string> = (value, path) => {
  const words = text(value, path);
  parseBarometer(words);
  return words;
};

const readLoad: Read<Load> = object((fields) => ({
  format: fields.required('format', format('dwellbook-load/1')),
  ...fields.optional('workOrder', text),
  ...fields.optional('barometer', barometer),
  parts: fields.required('parts', listOf(part)),
  sensors: fields.optional('sensors', listOf(sensor)).sensors ?? [],
  ...fields.optional('exclusions', listOf(exclusion)),
}));

function checkSensorParts({ parts, sensors }: Load): void {
  const names = parts.map((one) => one.part);
  for (const [i, one] of sensors.entries()) {
    for (const [k, name] of (one.parts ?? []).entries()) {
      if (names.includes(name)) continue;
      throw new DomainError(
        'part-unknown',
        `sensors[${i}].parts[${k}]: no part of this load is called "${name}"; its parts are: ${names.join(', ') || 'none'}`,
        { key: `sensors[${i}].parts[${k}]`, part: name },
      );
    }
  }
}

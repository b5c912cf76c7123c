import { DomainError } from '../errors.ts';

/** What a zone's clocks show, turned into instants. Local times are ms since 1970-01-01 as the clock on the wall reads. */
export interface Zone {
  readonly name: string;
  /** The only, or the first, instant at which clocks showed `localMs`; NaN where the zone skips that time. */
  instantOf(localMs: number): number;
  /** The second instant at which clocks showed `localMs`; NaN where there is none. */
  secondInstantOf(localMs: number): number;
}

/** An IANA zone, or an offset such as `+01:00`; throws `zone-unknown`. */
export function findZone(name: string): Zone {
  const offsetMs = offsetFromText(name);
  return offsetMs === null ? namedZone(name) : fixedZone(name, offsetMs);
}

/** Offset in ms of `Z`, `+01:00`, `-0530`, `+02`; null for anything else. */
export function offsetFromText(text: string): number | null {
  if (text === 'Z') return 0;
  const match = /^([+-])(\d\d)(?::?([0-5]\d))?$/.exec(text);
  if (!match) return null;
  const minutes = Number(match[2]) * 60 + Number(match[3] ?? 0);
  if (minutes > 14 * 60) return null; // no clock on earth is further from UTC
  return (match[1] === '-' ? -minutes : minutes) * 60_000;
}

function fixedZone(name: string, offsetMs: number): Zone {
  return { name, instantOf: (localMs) => localMs - offsetMs, secondInstantOf: () => Number.NaN };
}

const HOUR_MS = 3_600_000;

/** A stretch of one offset: instants from `fromMs` to before `untilMs`. */
interface Stretch {
  readonly fromMs: number;
  readonly untilMs: number;
  readonly offsetMs: number;
}

function namedZone(name: string): Zone {
  const offsetAt = offsetsOf(name);
  // What was last looked up: the stretches that hold for local times from `fromMs` to before `untilMs`.
  let fromMs = 0;
  let untilMs = 0;
  let stretches: readonly Stretch[] = [];
  let onlyOffsetMs = Number.NaN;

  function lookUp(localMs: number): void {
    fromMs = localMs - 12 * HOUR_MS;
    untilMs = localMs + 12 * HOUR_MS;
    stretches = stretchesAround(localMs, offsetAt);
    onlyOffsetMs = stretches.length === 1 ? stretches[0]!.offsetMs : Number.NaN;
  }

  /** The first or second instant in the stretches; NaN where there is none. */
  function instant(localMs: number, count: 1 | 2): number {
    let found = 0;
    for (const stretch of stretches) {
      const instantMs = localMs - stretch.offsetMs;
      if (instantMs >= stretch.fromMs && instantMs < stretch.untilMs && ++found === count) return instantMs;
    }
    return Number.NaN;
  }

  return {
    name,
    instantOf(localMs) {
      if (!(localMs >= fromMs && localMs < untilMs)) lookUp(localMs);
      return stretches.length === 1 ? localMs - onlyOffsetMs : instant(localMs, 1);
    },
    secondInstantOf(localMs) {
      if (!(localMs >= fromMs && localMs < untilMs)) lookUp(localMs);
      return stretches.length === 1 ? Number.NaN : instant(localMs, 2);
    },
  };
}

/** The stretches of one offset within 36 hours of a local time: one, or more where the offset changes. */
function stretchesAround(localMs: number, offsetAt: (instantMs: number) => number): Stretch[] {
  const firstMs = Math.floor((localMs - 36 * HOUR_MS) / HOUR_MS) * HOUR_MS;
  const lastMs = firstMs + 78 * HOUR_MS;
  const stretches: Stretch[] = [];
  let fromMs = firstMs;
  let offsetMs = offsetAt(firstMs);
  for (let atMs = firstMs; atMs < lastMs; atMs += 6 * HOUR_MS) {
    const nextOffsetMs = offsetAt(atMs + 6 * HOUR_MS);
    if (nextOffsetMs === offsetMs) continue;
    const changeMs = changeBetween(atMs, atMs + 6 * HOUR_MS, offsetAt);
    stretches.push({ fromMs, untilMs: changeMs, offsetMs });
    fromMs = changeMs;
    offsetMs = nextOffsetMs;
  }
  stretches.push({ fromMs, untilMs: lastMs, offsetMs });
  return stretches;
}

/** The whole second at which the offset changes, by bisection. */
function changeBetween(fromMs: number, untilMs: number, offsetAt: (instantMs: number) => number): number {
  const before = offsetAt(fromMs);
  let low = fromMs;
  let high = untilMs;
  while (high - low > 1000) {
    const middle = low + Math.floor((high - low) / 2000) * 1000;
    if (offsetAt(middle) === before) low = middle;
    else high = middle;
  }
  return high;
}

/** The zone's offset from UTC in ms at an instant, as the platform's copy of the IANA database has it. */
function offsetsOf(name: string): (instantMs: number) => number {
  const format = clockOf(name);
  return (instantMs) => {
    const shown: Record<string, number> = {};
    for (const { type, value } of format.formatToParts(instantMs)) shown[type] = Number(value);
    const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = shown;
    return Date.UTC(year, month - 1, day, hour, minute, second) - instantMs;
  };
}

/** Making one costs more than reading a small log. */
const clocks = new Map<string, Intl.DateTimeFormat>();
const MOST_CLOCKS = 50;

function clockOf(name: string): Intl.DateTimeFormat {
  const known = clocks.get(name);
  if (known) return known;
  if (clocks.size >= MOST_CLOCKS) clocks.clear();
  try {
    const clock = new Intl.DateTimeFormat('en-US', {
      timeZone: name,
      calendar: 'gregory',
      numberingSystem: 'latn',
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
    });
    clocks.set(name, clock);
    return clock;
  } catch (cause) {
    throw new DomainError(
      'zone-unknown',
      `"${name}" is neither an IANA time zone (such as Europe/Lisbon) nor an offset (such as +01:00)`,
      { zone: name },
      { cause },
    );
  }
}

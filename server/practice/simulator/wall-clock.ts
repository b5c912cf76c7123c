/** Date and time as a clock on the wall of a zone shows them. */
export interface WallClock {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
}

const QUARTER_MS = 900_000;

/** A clock for one zone (IANA name, `UTC` or an offset such as `+01:00`). Offsets change only at quarter hours. */
export function wallClockIn(zone: string): (instantMs: number) => WallClock {
  const fixed = /^([+-])(\d\d):(\d\d)$/.exec(zone);
  const fixedMs = fixed ? (fixed[1] === '-' ? -1 : 1) * (Number(fixed[2]) * 60 + Number(fixed[3])) * 60_000 : null;
  const offsetOf = fixedMs === null ? offsetsOf(zone) : () => fixedMs;
  const offsets = new Map<number, number>();
  const offsetAt = (instantMs: number): number => {
    const quarter = Math.floor(instantMs / QUARTER_MS);
    const known = offsets.get(quarter);
    if (known !== undefined) return known;
    const offset = offsetOf(quarter * QUARTER_MS);
    offsets.set(quarter, offset);
    return offset;
  };
  return (instantMs) => {
    const local = new Date(instantMs + offsetAt(instantMs));
    return {
      year: local.getUTCFullYear(),
      month: local.getUTCMonth() + 1,
      day: local.getUTCDate(),
      hour: local.getUTCHours(),
      minute: local.getUTCMinutes(),
      second: local.getUTCSeconds(),
    };
  };
}

/** Writes a clock by a Unicode TR 35 pattern; knows the letters the practice recorders use. */
export function stampBy(pattern: string): (clock: WallClock) => string {
  const tokens = pattern.match(/'[^']*'|([A-Za-z])\1*|[^A-Za-z']+/g) ?? [];
  const writers = tokens.map(writerOf);
  return (clock) => {
    let stamp = '';
    for (const write of writers) stamp += write(clock);
    return stamp;
  };
}

const TWO_DIGITS = Array.from({ length: 100 }, (_, n) => String(n).padStart(2, '0'));
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

const WRITERS: Readonly<Record<string, (clock: WallClock) => string | undefined>> = {
  yyyy: ({ year }) => String(year),
  yy: ({ year }) => TWO_DIGITS[year % 100],
  MMM: ({ month }) => MONTHS[month - 1],
  MM: ({ month }) => TWO_DIGITS[month],
  M: ({ month }) => String(month),
  dd: ({ day }) => TWO_DIGITS[day],
  d: ({ day }) => String(day),
  HH: ({ hour }) => TWO_DIGITS[hour],
  hh: ({ hour }) => TWO_DIGITS[((hour + 11) % 12) + 1],
  h: ({ hour }) => String(((hour + 11) % 12) + 1),
  mm: ({ minute }) => TWO_DIGITS[minute],
  ss: ({ second }) => TWO_DIGITS[second],
  a: ({ hour }) => (hour < 12 ? 'AM' : 'PM'),
};

function writerOf(token: string): (clock: WallClock) => string | undefined {
  if (token.startsWith("'")) return () => token.slice(1, -1);
  const known = WRITERS[token];
  if (known !== undefined) return known;
  if (/[A-Za-z]/.test(token)) throw new Error(`no practice recorder writes "${token}"`);
  return () => token;
}

function offsetsOf(zone: string): (instantMs: number) => number {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    calendar: 'gregory',
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
  return (instantMs) => {
    const at = new Map(format.formatToParts(instantMs).map(({ type, value }) => [type, Number(value)]));
    const [year, month, day] = [at.get('year')!, at.get('month')!, at.get('day')!];
    return Date.UTC(year, month - 1, day, at.get('hour')!, at.get('minute')!, at.get('second')!) - instantMs;
  };
}

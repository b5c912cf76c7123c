/** Clock and calendar as a shop says them, in the zone the shop's clock is in. */

const cache = new Map<string, Intl.DateTimeFormat>();

/** `08:14` */
export function clock(at: string | number, zone: string): string {
  return format('time', zone, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(new Date(at));
}

/** `08:14:30` */
export function clockWithSeconds(at: string | number, zone: string): string {
  const parts = { hour: '2-digit', minute: '2-digit', second: '2-digit', hourCycle: 'h23' } as const;
  return format('seconds', zone, parts).format(new Date(at));
}

/** `3 March 2026` */
export function day(at: string | number, zone: string): string {
  return format('day', zone, { day: 'numeric', month: 'long', year: 'numeric' }).format(new Date(at));
}

/** `3 Mar 2026` */
export function shortDay(at: string | number, zone: string): string {
  return format('short', zone, { day: 'numeric', month: 'short', year: 'numeric' }).format(new Date(at));
}

/** `Tuesday` */
export function weekday(at: string | number, zone: string): string {
  return format('weekday', zone, { weekday: 'long' }).format(new Date(at));
}

/** `3 March 2026, 08:14` */
export function dayAndClock(at: string | number, zone: string): string {
  return `${day(at, zone)}, ${clock(at, zone)}`;
}

/** `08:14 to 15:20`, with the day of the end where it is another. */
export function stretch(from: string, until: string, zone: string): string {
  const end = day(from, zone) === day(until, zone) ? clock(until, zone) : dayAndClock(until, zone);
  return `${clock(from, zone)} to ${end}`;
}

/** `6 h 31 min`, `45 min`, `30 s`. */
export function lasting(ms: number): string {
  if (ms < 60_000) return `${Math.round(ms / 1000)} s`;
  const minutes = Math.round(ms / 60_000);
  const hours = Math.floor(minutes / 60);
  if (hours === 0) return `${minutes} min`;
  return minutes % 60 === 0 ? `${hours} h` : `${hours} h ${minutes % 60} min`;
}

/** Wall-clock fields for `<input type="datetime-local">`: `2026-03-02T08:14:00`. */
export function wallClock(at: string | number, zone: string): string {
  const options = {
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  } as const;
  const parts = format('wall', zone, options).formatToParts(new Date(at));
  const part = (type: string) => parts.find((p) => p.type === type)?.value ?? '';
  return `${part('year')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}:${part('second')}`;
}

/** The instant, in ms, of a wall-clock time in a zone; in an hour that comes twice the first. `null` where none is. */
export function instantOfWallClock(wall: string, zone: string): number | null {
  const asUtc = Date.parse(`${wall.length === 16 ? `${wall}:00` : wall}Z`);
  if (Number.isNaN(asUtc)) return null;
  const tries = [asUtc - 86_400_000, asUtc + 86_400_000].map((near) => asUtc - offsetMs(near, zone));
  const hits = tries.filter((at) => Date.parse(`${wallClock(at, zone)}Z`) === asUtc);
  return hits.length === 0 ? null : Math.min(...hits);
}

function offsetMs(at: number, zone: string): number {
  return Date.parse(`${wallClock(at, zone)}Z`) - Math.floor(at / 1000) * 1000;
}

function format(name: string, zone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${name} ${zone}`;
  const found = cache.get(key);
  if (found) return found;
  const made = new Intl.DateTimeFormat('en-GB', { ...options, timeZone: zone });
  cache.set(key, made);
  return made;
}

import type { EventKind, LedgerEvent } from './ledger.ts';

// Lines of one instant stand in this order, whichever was written first.
const RANK: Readonly<Record<EventKind, number>> = {
  received: 0,
  cut: 0,
  extended: 1,
  in: 2,
  out: 3,
  room: 4,
  thawed: 5,
  opened: 6,
  excursion: 7,
  scrapped: 8,
};

/** Lines in the order they happened; the order they were written in does not matter. */
export function sortedEvents(events: readonly LedgerEvent[]): LedgerEvent[] {
  const keyed = events.map((event) => ({ event, ms: Date.parse(event.at), text: JSON.stringify(event) }));
  keyed.sort((a, b) => a.ms - b.ms || RANK[a.event.kind] - RANK[b.event.kind] || (a.text < b.text ? -1 : 1));
  return keyed.map(({ event }) => event);
}

/** The day of an instant (UTC), as `2026-03-02`. */
export function dayOf(at: number | string): string {
  return new Date(at).toISOString().slice(0, 10);
}

const DAY_MIN = 1440;

/** Minutes as people say them: `6 d 4 h`, `3 h 20 min`, `12 min`. */
export function durationWords(minutes: number): string {
  const whole = Math.round(minutes);
  if (whole < 60) return `${whole} min`;
  const [days, hours, rest] = [Math.floor(whole / DAY_MIN), Math.floor((whole % DAY_MIN) / 60), whole % 60];
  if (days === 0) return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
  return hours === 0 ? `${days} d` : `${days} d ${hours} h`;
}

import { offsetFromText } from '../../models/log/time-zone.ts';

/** Instants are ms in the readings and ISO 8601 in UTC everywhere a person or a document sees them. */
export function isoFromMs(ms: number): string {
  return new Date(ms).toISOString();
}

/** The calendar day it was in a zone at an instant: `2026-03-02`. */
export function dayIn(zone: string, ms: number): string {
  const offsetMs = offsetFromText(zone);
  if (offsetMs !== null) return isoFromMs(ms + offsetMs).slice(0, 10);
  // Sweden writes days as ISO 8601 does.
  return new Intl.DateTimeFormat('sv-SE', { timeZone: zone, dateStyle: 'short' }).format(ms);
}

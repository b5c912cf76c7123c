import { describe, expect, it } from 'vitest';
import { findZone } from '../../../models/log/time-zone.ts';
import { refusalOf } from './logs.ts';

/** First and second instant at which clocks of a zone showed a local time, as ISO; null where there is none. */
function instants(name: string, local: string): [string | null, string | null] {
  const zone = findZone(name);
  const localMs = Date.parse(`${local}Z`);
  const iso = (timeMs: number) => (Number.isNaN(timeMs) ? null : new Date(timeMs).toISOString().replace('.000Z', 'Z'));
  return [iso(zone.instantOf(localMs)), iso(zone.secondInstantOf(localMs))];
}

// Source of the rules: IANA time zone database 2024a. Europe/Lisbon: EU rules, changes at 01:00 UTC on the last Sundays of
// March and October. America/New_York: US rules since 2007, second Sunday of March and first of November at 02:00 wall
// clock. Australia/Lord_Howe: half an hour, first Sundays of April and October at 02:00. Asia/Kathmandu: +05:45, no changes.
// Pacific/Apia: skipped 30 December 2011 whole.
describe('findZone', () => {
  it.each([
    ['Europe/Lisbon', '2026-03-03T08:14:00', '2026-03-03T08:14:00Z', null],
    ['Europe/Lisbon', '2026-07-03T08:14:00', '2026-07-03T07:14:00Z', null],
    ['Europe/Lisbon', '2026-10-25T00:59:59', '2026-10-24T23:59:59Z', null],
    ['Europe/Lisbon', '2026-10-25T01:00:00', '2026-10-25T00:00:00Z', '2026-10-25T01:00:00Z'],
    ['Europe/Lisbon', '2026-10-25T01:59:59', '2026-10-25T00:59:59Z', '2026-10-25T01:59:59Z'],
    ['Europe/Lisbon', '2026-10-25T02:00:00', '2026-10-25T02:00:00Z', null],
    ['Europe/Lisbon', '2026-03-29T00:59:59', '2026-03-29T00:59:59Z', null],
    ['Europe/Lisbon', '2026-03-29T01:00:00', null, null],
    ['Europe/Lisbon', '2026-03-29T01:59:59', null, null],
    ['Europe/Lisbon', '2026-03-29T02:00:00', '2026-03-29T01:00:00Z', null],
    ['America/New_York', '2026-03-08T02:30:00', null, null],
    ['America/New_York', '2026-11-01T01:30:00', '2026-11-01T05:30:00Z', '2026-11-01T06:30:00Z'],
    ['Australia/Lord_Howe', '2026-04-05T01:45:00', '2026-04-04T14:45:00Z', '2026-04-04T15:15:00Z'],
    ['Australia/Lord_Howe', '2026-04-05T01:29:59', '2026-04-04T14:29:59Z', null],
    ['Australia/Lord_Howe', '2026-10-04T02:15:00', null, null],
    ['Australia/Lord_Howe', '2026-10-04T02:30:00', '2026-10-03T15:30:00Z', null],
    ['Asia/Kathmandu', '2026-03-03T08:14:00', '2026-03-03T02:29:00Z', null],
    ['Pacific/Apia', '2011-12-30T12:00:00', null, null],
    ['Pacific/Apia', '2011-12-29T23:59:59', '2011-12-30T09:59:59Z', null],
    ['+05:30', '2026-03-03T08:14:00', '2026-03-03T02:44:00Z', null],
    ['-03', '2026-03-03T08:14:00', '2026-03-03T11:14:00Z', null],
    ['Z', '2026-03-03T08:14:00', '2026-03-03T08:14:00Z', null],
  ])('%s showed %s at %s and %s', (zone, local, first, second) => {
    expect(instants(zone, local)).toEqual([first, second]);
  });

  it('answers the same in any order of asking, also by what it remembers', () => {
    const times = Array.from({ length: 400 }, (_, i) => Date.UTC(2026, 9, 20) + i * 1_800_000);
    const asked = (order: readonly number[]) => {
      const zone = findZone('Europe/Lisbon');
      return new Map(order.map((time) => [time, [zone.instantOf(time), zone.secondInstantOf(time)]]));
    };
    const rising = asked(times);
    const jumping = asked(times.toSorted((a, b) => ((a / 1_800_000) % 17) - ((b / 1_800_000) % 17)));
    for (const time of times) expect(jumping.get(time)).toEqual(rising.get(time));
  });

  it.each(['Europe/Lisboa', '', '+25:00', '+1:00', 'local'])('refuses "%s"', (name) => {
    expect(refusalOf(() => findZone(name)).code).toBe('zone-unknown');
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clockTimeIn } from '../../../models/chart/clock-time.ts';
import { hoursWords, roundStep, roundTicks, timeTicksS } from '../../../models/chart/ticks.ts';

const seed = 20260302;

describe('roundTicks', () => {
  it('takes round figures inside the range', () => {
    expect(roundTicks(18.4, 191, 5)).toEqual([50, 100, 150]);
    expect(roundTicks(174.2, 186.1, 6)).toEqual([176, 178, 180, 182, 184, 186]);
    expect(roundTicks(0, 1, 2)).toEqual([0, 0.5, 1]);
    expect(roundTicks(-0.02, 0.9, 4)).toEqual([0, 0.5]);
  });

  it('has steps of 1, 2 or 5 times a power of ten, never more than asked for', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-4, max: 1e6, noNaN: true }), fc.integer({ min: 1, max: 12 }), (span, count) => {
        const step = roundStep(span / count);
        expect(step).toBeGreaterThanOrEqual((span / count) * (1 - 1e-6));
        expect(step).toBeLessThanOrEqual((span / count) * 2.5 * (1 + 1e-6));
        expect(roundTicks(0, span, count).length).toBeLessThanOrEqual(count + 1);
      }),
      { seed },
    );
  });
});

describe('timeTicksS', () => {
  it('counts in steps of the clock from heat-on', () => {
    expect(timeTicksS(-900, 23_000, 8)).toEqual([0, 3600, 7200, 10_800, 14_400, 18_000, 21_600]);
    expect(timeTicksS(-60, 120, 6)).toEqual([-60, -30, 0, 30, 60, 90, 120]);
    expect(timeTicksS(0, 10 * 86_400, 4)).toEqual([0, 259_200, 518_400, 777_600]);
  });
});

describe('hoursWords', () => {
  it.each([
    [0, '0 h'],
    [7200, '2 h'],
    [8100, '2 h 15'],
    [300, '0 h 05'],
    [-1800, '−0 h 30'],
    [95, '0 h 01:35'],
  ])('writes %d s as %s', (seconds, words) => {
    expect(hoursWords(seconds)).toBe(words);
  });
});

describe('clockTimeIn', () => {
  // IANA time zone database: Lisbon is on UTC in winter and UTC+1 from the last Sunday of March, 01:00 UTC.
  it('tells the time of the zone, summer and winter', () => {
    const lisbon = clockTimeIn('Europe/Lisbon');
    expect(lisbon.time(Date.UTC(2026, 2, 29, 0, 59))).toBe('00:59');
    expect(lisbon.time(Date.UTC(2026, 2, 29, 1, 0))).toBe('02:00');
    expect(lisbon.time(Date.UTC(2026, 2, 3, 8, 22, 30))).toBe('08:22:30');
    expect(clockTimeIn('America/New_York').day(Date.UTC(2026, 2, 3, 2, 0))).toBe('2 March 2026');
  });

  it('refuses a zone that is none', () => {
    expect(() => clockTimeIn('Europe/Skerry')).toThrow(expect.objectContaining({ code: 'zone-unknown' }));
  });
});

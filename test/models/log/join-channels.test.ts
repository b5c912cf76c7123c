import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { joinChannels, presentReadings } from '../../../models/log/join-channels.ts';
import { findShift } from '../../../models/log/join-shift.ts';
import type { ChannelLayout } from '../../../models/log/layout.ts';

const TC1: ChannelLayout = { column: 'TC1', name: 'TC1', role: 'part', unit: '°C' };

/** Readings at whole seconds; a figure of NaN is absent. */
function readings(source: number, pairs: readonly (readonly [number, number])[], changes: Partial<ChannelLayout> = {}) {
  const timeMs = Float64Array.from(pairs, ([s]) => 1000 * s);
  const value = Float64Array.from(pairs, ([, figure]) => figure);
  return presentReadings({ ...TC1, ...changes }, timeMs, value, source);
}

function every(s: number, from: number, until: number, figure: (at: number) => number): [number, number][] {
  return Array.from({ length: Math.floor((until - from) / s) + 1 }, (_, n) => [from + s * n, figure(from + s * n)]);
}

describe('joinChannels', () => {
  it('lets the later source speak in the gap of the earlier, and nowhere else', () => {
    const earlier = readings(1, [...every(1, 0, 10, () => 100), ...every(1, 20, 30, () => 120)]);
    const later = readings(
      2,
      every(1, -2, 33, (s) => 100 + s),
    );
    const { joined, difference } = joinChannels(earlier, later, 1000);
    const bySource = (n: number) => [...joined.timeMs].filter((_, i) => joined.source[i] === n).map((ms) => ms / 1000);
    expect(bySource(2)).toEqual([-2, -1, 11, 12, 13, 14, 15, 16, 17, 18, 19, 31, 32, 33]);
    expect(bySource(1)).toEqual([...earlier.timeMs].map((ms) => ms / 1000));
    expect(difference).toEqual({
      channel: 'TC1',
      unit: '°C',
      source: 2,
      compared: 22,
      // At 0 s and at 20 s the two read the same.
      differing: 20,
      toleranceOfBoth: null,
      largest: { difference: 10, atMs: 10_000 },
    });
  });

  it('compares between the earlier readings along the line that joins them', () => {
    const earlier = readings(
      1,
      every(2, 0, 20, (s) => 100 + s),
      { uncertainty: 0.5 },
    );
    const later = readings(
      2,
      [
        [5, 105.4],
        [7, 108.1],
        [9, 109],
      ],
      { uncertainty: 0.5 },
    );
    const { joined, difference } = joinChannels(earlier, later, 2000);
    expect([...joined.source]).toEqual(Array.from({ length: 11 }, () => 1));
    expect(difference).toMatchObject({ compared: 3, differing: 1, toleranceOfBoth: 1 });
    expect(difference.largest?.atMs).toBe(7000);
    expect(difference.largest?.difference).toBeCloseTo(1.1, 9);
  });

  it('puts no reading of one right beside one of the other: a difference would become a steep rate', () => {
    const earlier = readings(1, [
      [0, 100],
      [1, 100],
      [2, 100],
      [60, 100],
    ]);
    const later = readings(
      2,
      every(0.25, 2, 60, () => 103),
    );
    const { joined } = joinChannels(earlier, later, 1000);
    const filled = [...joined.timeMs].filter((_, n) => joined.source[n] === 2);
    expect([Math.min(...filled), Math.max(...filled)]).toEqual([2500, 59_500]);
  });

  it('brings figures of other scales into the unit, and leaves an uncertainty unknown where one is', () => {
    const earlier = readings(
      1,
      [
        [0, 1000],
        [1, 1001],
      ],
      { scale: 0.1, uncertainty: 1 },
    );
    const later = readings(2, [
      [0, 100],
      [60, 200],
    ]);
    const { joined, difference } = joinChannels(earlier, later, 1000);
    expect([...joined.value]).toEqual([100, 100.1, 200]);
    expect(joined.channel).toEqual(TC1);
    expect(difference.largest?.difference).toBe(0);
  });

  it('refuses a channel that is another thing in the other source', () => {
    const other = readings(2, [[0, 1]], { unit: '°F' });
    expect(() => joinChannels(readings(1, [[0, 1]]), other, 1000)).toThrow(
      expect.objectContaining({ code: 'state-conflict', facts: { channel: 'TC1' } }),
    );
  });

  it('keeps every earlier reading, in rising time, whatever comes later', () => {
    const seconds = fc.uniqueArray(fc.integer({ min: 0, max: 300 }), { maxLength: 80 });
    const source = seconds.map((all) => [...all].sort((a, b) => a - b).map((s): [number, number] => [s, s / 10]));
    fc.assert(
      fc.property(source, source, fc.integer({ min: 1, max: 20 }), (first, second, intervalS) => {
        const [earlier, later] = [readings(1, first), readings(2, second)];
        const { joined, difference } = joinChannels(earlier, later, 1000 * intervalS);
        const own = [...joined.timeMs].filter((_, n) => joined.source[n] === 1);
        expect(own).toEqual([...earlier.timeMs]);
        expect([...joined.timeMs]).toEqual([...new Set(joined.timeMs)].sort((a, b) => a - b));
        const filled = joined.timeMs.length - own.length;
        expect(filled + difference.compared).toBeLessThanOrEqual(later.timeMs.length);
        // Both read the same straight line, so that nothing differs but by rounding.
        expect(difference.differing).toBe(0);
      }),
    );
  });
});

describe('findShift', () => {
  /** Heats at 2 °C/min from 20 °C, dwells at 180 °C from 80 min on, cools at 3 °C/min from 200 min on. */
  const history = (s: number) => {
    const min = s / 60;
    return min < 80 ? 20 + 2 * min : min < 200 ? 180 : Math.max(20, 180 - 3 * (min - 200));
  };
  const tenths = (celsius: number) => Math.round(10 * celsius) / 10;
  const shared = (shiftS: number, intervalS: number, from = 0, until = 15_000, offset = 0) => [
    {
      earlier: readings(
        1,
        every(1, 0, 15_000, (s) => tenths(history(s))),
      ),
      later: readings(
        2,
        every(intervalS, from, until, (s) => tenths(history(s) + offset)).map(([s, figure]) => [s - shiftS, figure]),
      ),
    },
  ];

  it('finds how wrong a clock was, from seconds to the hour of summer time', () => {
    // A rounded 0.1 °C at 2 °C/min is 3 s; over thousands of readings what is left of it is a fraction of a second.
    for (const shiftS of [-3600, -47.5, -5, 12.25, 300, 3600, 7200]) {
      const { shiftMs, scatterWith } = findShift(shared(shiftS, 10));
      expect(Math.abs((shiftMs ?? Number.NaN) - 1000 * shiftS), `${shiftS} s`).toBeLessThanOrEqual(500);
      expect(scatterWith).toBeLessThan(0.1);
    }
  });

  it('is not led astray by two instruments that read a degree apart', () => {
    const { shiftMs } = findShift(shared(600, 10, 0, 15_000, 1));
    expect(Math.abs((shiftMs ?? Number.NaN) - 600_000)).toBeLessThanOrEqual(500);
  });

  it('proposes nothing where the clocks agree, where nothing changes, and where nothing overlaps', () => {
    expect(findShift(shared(0, 10))).toMatchObject({
      shiftMs: null,
      because: 'their clocks agree as well as can be told',
    });
    const flat = every(10, 0, 3600, () => 180);
    expect(findShift([{ earlier: readings(1, flat), later: readings(2, flat) }])).toMatchObject({
      shiftMs: null,
      because: 'where both read, nothing changes fast enough to tell their clocks apart',
    });
    const far = every(10, 100_000, 110_000, () => 20);
    expect(findShift([{ earlier: readings(1, flat), later: readings(2, far) }])).toMatchObject({
      shiftMs: null,
      because: 'the two do not overlap',
      compared: 0,
    });
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type DecimateOptions, decimate } from '../../../models/chart/decimate.ts';

const seed = 20260302;

/** A channel on a 10 s raster with some scans left out and some readings absent, and a window on it. */
const channel = fc
  .array(
    fc.record({
      stepS: fc.oneof(
        { weight: 8, arbitrary: fc.constant(10) },
        { weight: 1, arbitrary: fc.integer({ min: 11, max: 400 }) },
      ),
      value: fc.oneof({ weight: 6, arbitrary: fc.integer({ min: -50, max: 200 }) }, fc.constant(Number.NaN)),
    }),
    { minLength: 1, maxLength: 400 },
  )
  .chain((scans) => {
    let t = 0;
    const timeMs = Float64Array.from(scans, ({ stepS }) => (t += stepS * 1000));
    const value = Float64Array.from(scans, (scan) => scan.value);
    const within = fc.integer({ min: -20_000, max: t + 20_000 });
    return fc.record({
      timeMs: fc.constant(timeMs),
      value: fc.constant(value),
      bounds: fc.tuple(within, within).filter(([a, b]) => a !== b),
      points: fc.integer({ min: 20, max: 200 }),
    });
  })
  .map(({ timeMs, value, bounds, points }) => {
    const options: DecimateOptions = {
      fromMs: Math.min(...bounds),
      untilMs: Math.max(...bounds),
      points,
      longestGapMs: 60_000,
    };
    return { timeMs, value, options };
  });

const inWindow = (t: number, { fromMs, untilMs }: DecimateOptions) => t >= fromMs && t <= untilMs;

describe('decimate', () => {
  it('keeps to its number of points, in rising time, and every point is a reading', () => {
    fc.assert(
      fc.property(channel, ({ timeMs, value, options }) => {
        const kept = decimate(timeMs, value, options);
        expect(kept.timeMs.length).toBeLessThanOrEqual(options.points);
        kept.timeMs.forEach((t, i) => {
          if (i > 0) expect(t).toBeGreaterThan(kept.timeMs[i - 1]!);
          if (!Number.isNaN(kept.value[i]!)) expect(kept.value[i]).toBe(value[timeMs.indexOf(t)]);
        });
      }),
      { seed, numRuns: 500 },
    );
  });

  it('never loses an extreme: each reading lies between points kept within one bucket of it', () => {
    fc.assert(
      fc.property(channel, ({ timeMs, value, options }) => {
        const kept = decimate(timeMs, value, options);
        const bucketMs = (options.untilMs - options.fromMs) / Math.floor(options.points / 6);
        timeMs.forEach((t, i) => {
          if (Number.isNaN(value[i]!) || !inWindow(t, options)) return;
          const near = [...kept.value].filter((v, k) => !Number.isNaN(v) && Math.abs(kept.timeMs[k]! - t) <= bucketMs);
          expect(Math.min(...near)).toBeLessThanOrEqual(value[i]!);
          expect(Math.max(...near)).toBeGreaterThanOrEqual(value[i]!);
        });
      }),
      { seed, numRuns: 500 },
    );
  });

  it('joins no two readings further apart than the longest gap, but within one bucket', () => {
    fc.assert(
      fc.property(channel, ({ timeMs, value, options }) => {
        const kept = decimate(timeMs, value, options);
        const bucketMs = (options.untilMs - options.fromMs) / Math.floor(options.points / 6);
        for (let k = 1; k < kept.timeMs.length; k++) {
          if (Number.isNaN(kept.value[k]!) || Number.isNaN(kept.value[k - 1]!)) continue;
          const [a, b] = [kept.timeMs[k - 1]!, kept.timeMs[k]!];
          const inside = [...timeMs].filter((t, i) => t >= a && t <= b && !Number.isNaN(value[i]!));
          const widest = Math.max(...inside.slice(1).map((t, i) => t - inside[i]!));
          expect(widest <= options.longestGapMs || b - a < bucketMs).toBe(true);
        }
      }),
      { seed, numRuns: 500 },
    );
  });

  it('lists every stretch without readings, cut to the window', () => {
    fc.assert(
      fc.property(channel, ({ timeMs, value, options }) => {
        const { fromMs, untilMs, longestGapMs } = options;
        const present = [...timeMs].filter((_, i) => !Number.isNaN(value[i]!));
        const ends = [timeMs[0]!, ...present, timeMs.at(-1)!];
        const expected = ends
          .slice(1)
          .map((until, i) => ({ from: ends[i]!, until, isEnd: i === 0 || i === ends.length - 2 }))
          .filter(({ from, until, isEnd }) => until - from > (isEnd ? 0 : longestGapMs))
          .map(({ from, until }) => ({ fromMs: Math.max(from, fromMs), untilMs: Math.min(until, untilMs) }))
          .filter((gap) => gap.untilMs > gap.fromMs);
        if (present.length === 0) return;
        expect(decimate(timeMs, value, options).gaps).toEqual(expected);
      }),
      { seed, numRuns: 500 },
    );
  });

  it('keeps every reading of the window where they fit', () => {
    const timeMs = Float64Array.from({ length: 15 }, (_, i) => i * 1000);
    const value = Float64Array.from({ length: 15 }, (_, i) => i % 3);
    const kept = decimate(timeMs, value, { fromMs: 0, untilMs: 14_000, points: 20, longestGapMs: 60_000 });
    expect([...kept.value]).toEqual([...value]);
  });

  it('reaches the edges of a window between two readings', () => {
    const timeMs = Float64Array.from([0, 50_000, 100_000]);
    const value = Float64Array.from([20, 25, 30]);
    const options = { fromMs: 51_000, untilMs: 52_000, points: 20, longestGapMs: 60_000 };
    expect([...decimate(timeMs, value, options).timeMs]).toEqual([50_000, 100_000]);
  });

  it('shows a spike of one scan in 36 000', () => {
    const timeMs = Float64Array.from({ length: 36_000 }, (_, i) => i * 1000);
    const value = new Float64Array(36_000).fill(180);
    value[17_321] = 187.4;
    const kept = decimate(timeMs, value, { fromMs: 0, untilMs: 36_000_000, points: 300, longestGapMs: 60_000 });
    expect(Math.max(...kept.value)).toBe(187.4);
    expect(kept.timeMs[kept.value.indexOf(187.4)]).toBe(17_321_000);
  });

  it('keeps four readings of a bucket where rounding would count one bucket twice', () => {
    // 14 buckets of 18 432 ms: the eighth begins on a reading, which (t − from) / width puts into the seventh.
    const fromMs = 1_772_525_640_000;
    const timeMs = Float64Array.from({ length: 145 }, (_, i) => fromMs + i * 128);
    // In each bucket of ten readings a high and a low one between level ones: four to be kept.
    const share = (i: number) => ((i * 128) / (18_432 / 14)) % 1;
    const value = Float64Array.from({ length: 145 }, (_, i) =>
      Math.abs(share(i) - 0.35) < 0.05 ? 1 : Math.abs(share(i) - 0.65) < 0.05 ? -1 : 0,
    );
    const kept = decimate(timeMs, value, { fromMs, untilMs: fromMs + 18_432, points: 84, longestGapMs: 60_000 });
    expect(kept.timeMs.length).toBe(4 * 14);
  });

  it('keeps to its room and to the record’s end where there are more gaps than it can break the line at', () => {
    const timeMs = Float64Array.from({ length: 400 }, (_, i) => i * 61_000);
    const value = Float64Array.from({ length: 400 }, (_, i) => (i * 7919) % 101);
    const kept = decimate(timeMs, value, { fromMs: 0, untilMs: timeMs[399]!, points: 20, longestGapMs: 60_000 });
    expect(kept.timeMs.length).toBeLessThanOrEqual(20);
    expect(kept.timeMs.at(-1)).toBe(timeMs[399]);
    expect(kept.gaps).toHaveLength(399);
  });

  it('hatches a channel without any reading from end to end', () => {
    const timeMs = Float64Array.from([0, 1000, 2000]);
    const kept = decimate(timeMs, new Float64Array(3).fill(Number.NaN), {
      fromMs: 500,
      untilMs: 5000,
      points: 20,
      longestGapMs: 60_000,
    });
    expect(kept.timeMs).toHaveLength(0);
    expect(kept.gaps).toEqual([{ fromMs: 500, untilMs: 2000 }]);
  });

  const refused: readonly Partial<DecimateOptions>[] = [{ points: 19 }, { points: Number.NaN }, { untilMs: 0 }];

  it.each(refused)('refuses %j', (changes) => {
    const options = { fromMs: 0, untilMs: 1000, points: 20, longestGapMs: 60_000, ...changes };
    expect(() => decimate(Float64Array.of(0), Float64Array.of(1), options)).toThrow(
      expect.objectContaining({ code: 'option-out-of-range' }),
    );
  });
});

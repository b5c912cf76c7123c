import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type DrawnChannel, drawnChannel, extremesOf, shownAt } from '../../../models/chart/drawn-channel.ts';
import { excursionAround } from '../../../models/chart/excursion.ts';
import {
  AS_IT_STANDS,
  converted,
  pressureConversion,
  temperatureConversion,
} from '../../../models/chart/shown-unit.ts';
import type { ChannelLayout } from '../../../models/log/layout.ts';

const seed = 20260302;
const layout: ChannelLayout = { column: 'T1', name: 'TC1', role: 'part', unit: '°C' };
const shown = (figure: number, conversion: ReturnType<typeof temperatureConversion>) =>
  conversion === null ? null : converted(figure, conversion);

describe('conversions for drawing', () => {
  // t/°F = 1.8 t/°C + 32 (NIST SP 811, 2008, app. B.8); −40 is the fixed point.
  it.each([
    [100, '°C', '°F', 212],
    [-40, '°C', '°F', -40],
    [350, '°F', '°C', 176.6667],
    [180, '°C', '°C', 180],
  ])('shows %d %s in %s as %d', (figure, from, to, expected) => {
    expect(shown(figure, temperatureConversion(from, to))).toBeCloseTo(expected, 4);
  });

  // Worked by hand at 1013.25 mbar: 22 inHg (74.5 kPa) below ambient leaves 268 mbar; 1 bar gauge is 2.01325 bar absolute.
  it.each([
    ['vacuum', 22, 'inHg', 'mbar abs', 268.2],
    ['vacuum', 268.2, 'mbar abs', 'inHg', 22.0],
    ['vacuum', 0.75, 'bar', 'kPa', 75],
    ['pressure', 1, 'bar', 'bar abs', 2.01325],
    ['pressure', 2.01325, 'bar abs', 'psi', 14.50377],
    ['pressure', 100, 'psi', 'bar', 6.89476],
  ] as const)('shows a %s of %d %s in %s as %d', (quantity, figure, from, to, expected) => {
    expect(shown(figure, pressureConversion(quantity, from, to, 101_325))).toBeCloseTo(expected, 1);
  });

  it('does not guess the barometer', () => {
    expect(pressureConversion('vacuum', 'bar', 'mbar abs', null)).toBeNull();
    expect(pressureConversion('pressure', 'bar abs', 'bar', null)).toBeNull();
    expect(temperatureConversion('bar', '°C')).toBeNull();
  });
});

describe('drawnChannel', () => {
  const timeMs = Float64Array.from([0, 1000, 2000, 3000]);

  it('applies scale, then corrections, then the strip’s unit', () => {
    const corrections = [
      [100, -0.4],
      [180, -0.8],
    ] as const;
    const channel = drawnChannel(
      { ...layout, scale: 0.1 },
      'temperature',
      timeMs,
      Float64Array.of(1400, 1800, 900, 2000),
      temperatureConversion('°C', '°F')!,
      { channel: 'TC1', corrections },
    );
    // 140.0 °C corrected by −0.6 (half way): 139.4 °C, 282.92 °F; held at −0.4 below and −0.8 above the points.
    expect([...channel.figures].map(channel.shown)).toEqual([
      expect.closeTo(282.92, 9),
      expect.closeTo(1.8 * 179.2 + 32, 9),
      expect.closeTo(1.8 * 89.6 + 32, 9),
      expect.closeTo(1.8 * 199.2 + 32, 9),
    ]);
  });

  it('keeps extremes true where a correction falls faster than the reading rises', () => {
    const corrections = [
      [10, 0],
      [11, -3],
    ] as const;
    const channel = drawnChannel(layout, 'temperature', timeMs, Float64Array.of(10, 10.5, 11, 12), AS_IT_STANDS, {
      channel: 'TC1',
      corrections,
    });
    // Corrected: 10, 9, 8, 9.
    expect(extremesOf(channel, 0, 3000)).toEqual({ lowest: 8, lowestMs: 2000, highest: 10, highestMs: 0 });
  });

  it('finds the extremes of what is shown whichever way the unit runs', () => {
    const figures = fc.array(
      fc.oneof({ weight: 5, arbitrary: fc.integer({ min: 0, max: 90 }) }, fc.constant(Number.NaN)),
      { minLength: 1, maxLength: 30 },
    );
    fc.assert(
      fc.property(figures, fc.constantFrom(1, -0.5), fc.nat(30), fc.nat(30), (values, slope, a, b) => {
        const times = Float64Array.from(values, (_, i) => i * 1000);
        const channel = drawnChannel(
          layout,
          'vacuum',
          times,
          Float64Array.from(values),
          { slope, intercept: 3 },
          undefined,
        );
        const [from, until] = [Math.min(a, b) * 1000, Math.max(a, b) * 1000];
        const inside = values
          .filter((v, i) => !Number.isNaN(v) && i * 1000 >= from && i * 1000 <= until)
          .map(channel.shown);
        const found = extremesOf(channel, from, until);
        if (inside.length === 0) expect(found).toBeNull();
        else expect([found!.lowest, found!.highest]).toEqual([Math.min(...inside), Math.max(...inside)]);
      }),
      { seed },
    );
  });

  it('reads between readings on the straight line, and nowhere outside them', () => {
    const channel = drawnChannel(
      layout,
      'temperature',
      timeMs,
      Float64Array.of(Number.NaN, 10, Number.NaN, 30),
      AS_IT_STANDS,
      undefined,
    );
    expect([0, 999, 1000, 1500, 2000, 3000, 3001].map((t) => shownAt(channel, t))).toEqual([
      null,
      null,
      10,
      15,
      20,
      30,
      null,
    ]);
  });
});

describe('excursionAround', () => {
  const channelOf = (values: readonly number[]): DrawnChannel =>
    drawnChannel(
      layout,
      'temperature',
      Float64Array.from(values, (_, i) => i * 1000),
      Float64Array.from(values),
      AS_IT_STANDS,
      undefined,
    );

  it('ends where the line between readings meets the level', () => {
    const channel = channelOf([180, 184, 188, 187, 183, 180]);
    expect(excursionAround(channel, 185, 2000, { fromMs: 0, untilMs: 5000 })).toEqual({ fromMs: 1250, untilMs: 3500 });
    expect(excursionAround(channel, 185, 2000, { fromMs: 1800, untilMs: 5000 })).toEqual({
      fromMs: 1800,
      untilMs: 3500,
    });
    expect(excursionAround(channel, 180, 0, { fromMs: 0, untilMs: 5000 })).toBeNull();
  });

  it('holds the instant and only readings beyond the level', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 10 }), { minLength: 2, maxLength: 20 }),
        fc.nat(19),
        (values, at) => {
          fc.pre(at < values.length && values[at] !== 5);
          const bounds = { fromMs: 0, untilMs: (values.length - 1) * 1000 };
          const { fromMs, untilMs } = excursionAround(channelOf(values), 5, at * 1000, bounds)!;
          expect(fromMs).toBeLessThanOrEqual(at * 1000);
          expect(untilMs).toBeGreaterThanOrEqual(at * 1000);
          values.forEach((value, i) => {
            if (i * 1000 > fromMs && i * 1000 < untilMs) expect(value > 5).toBe(values[at]! > 5);
          });
          if (untilMs === bounds.untilMs) return;
          // A reading on the level is not beyond it.
          expect(Math.sign(values[Math.ceil(untilMs / 1000)]! - 5)).not.toBe(Math.sign(values[at]! - 5));
        },
      ),
      { seed, numRuns: 400 },
    );
  });
});

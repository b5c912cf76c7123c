import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Corner } from '../../../models/chart/chart.ts';
import { drawnChannel } from '../../../models/chart/drawn-channel.ts';
import { rateWedges } from '../../../models/chart/rate-wedges.ts';
import { runOverRange } from '../../../models/chart/run-over-range.ts';
import { AS_IT_STANDS, temperatureConversion } from '../../../models/chart/shown-unit.ts';
import { parseCycle } from '../../../models/cycle/parse-cycle.ts';
import type { PartEvaluation } from '../../../models/evaluation/evaluation.ts';
import { exampleWith } from '../cycle/example-cycle.ts';

const seed = 20260302;
const MINUTE_MS = 60_000;

/** A part judged by some sensors, of which nothing else is known. */
function partJudgedBy(names: readonly string[]): PartEvaluation {
  return {
    ...{ part: null, verdict: 'pending', withoutEstimates: 'pending', judgedBy: names, ownSensors: true },
    ...{ stages: [], windows: [], heatOn: null, findings: [], cure: [] },
  };
}

/** Rooms at 20 °C that each start at a minute of their own and change at their own steady rate, read every 10 s. */
function steady(sensors: readonly { startMin: number; ratePerMin: number }[], from = 20) {
  const timeMs = Float64Array.from({ length: 1800 }, (_, i) => i * 10_000);
  return sensors.map(({ startMin, ratePerMin }, k) => {
    const layout = { column: `T${k}`, name: `TC${k}`, role: 'part', unit: '°C' } as const;
    const value = timeMs.map((t) => from + ratePerMin * Math.max(0, t / MINUTE_MS - startMin));
    return drawnChannel(layout, 'temperature', timeMs, value, AS_IT_STANDS, undefined);
  });
}

const scale = { zeroMs: 0, isFromHeatOn: true, logFromMs: 0, logUntilMs: 1.8e7, fromMs: 0, untilMs: 1.8e7 };

function wedgesOf(rate: object, channels: ReturnType<typeof steady>, kind: 'heat' | 'cool' = 'heat', unit = '°C/min') {
  const stages = [{ name: 'ramp', kind, rate }];
  const cycle = parseCycle({
    ...exampleWith({ ceiling: undefined, spread: undefined, 'units.rate': unit }),
    stages,
    windows: [],
  });
  return rateWedges(cycle, partJudgedBy(channels.map(({ layout }) => layout.name)), channels, scale);
}

/** Whether a point lies in a polygon or within `hair` of it: by the side of every edge of a convex outline. */
function isInside([x, y]: Corner, corners: readonly Corner[], hair: number): boolean {
  const sides = corners.map(([x1, y1], i) => {
    const [x2, y2] = corners[(i + 1) % corners.length]!;
    return ((x2 - x1) * (y - y1) - (y2 - y1) * (x - x1)) / (Math.hypot(x2 - x1, y2 - y1) || 1);
  });
  return sides.every((side) => side <= hair) || sides.every((side) => side >= -hair);
}

describe('rateWedges', () => {
  const sensor = fc.record({
    startMin: fc.integer({ min: 0, max: 40 }),
    ratePerMin: fc.integer({ min: 50, max: 300 }).map((hundredths) => hundredths / 100),
  });

  it('holds every sensor that keeps to the rates, all the way through the range', () => {
    fc.assert(
      fc.property(
        fc.array(sensor, { minLength: 1, maxLength: 4 }),
        fc.constantFrom('both', 'least', 'most'),
        (sensors, which) => {
          const rate = {
            ...(which === 'most' ? {} : { atLeast: 0.5 }),
            ...(which === 'least' ? {} : { atMost: 3 }),
            ...{ over: [50, 100], average: 'chord', of: 'every' },
          };
          const channels = steady(sensors);
          const [wedge] = wedgesOf(rate, channels);
          for (const { timeMs, figures } of channels) {
            figures.forEach((value, i) => {
              if (value < 50 || value > 100) return;
              expect(isInside([timeMs[i]! / 3_600_000, value], wedge!.corners, 1e-4)).toBe(true);
            });
          }
        },
      ),
      { seed, numRuns: 60 },
    );
  });

  it('leaves out a sensor that is too fast', () => {
    const rate = { atLeast: 0.5, atMost: 3, over: [50, 100], average: 'chord', of: 'every' };
    const channels = steady([{ startMin: 0, ratePerMin: 5 }]);
    const [wedge] = wedgesOf(rate, channels);
    expect(isInside([16 / 60, 100], wedge!.corners, 1e-4)).toBe(false);
    expect(wedge).toMatchObject({ stage: 'ramp', text: '0.5 to 3 °C/min', limits: ['ramp/slowest', 'ramp/fastest'] });
    // From 50 °C at 6 min, the fastest way takes 50/3 min.
    expect(wedge!.corners[0]).toEqual([expect.closeTo(6 / 60, 5), 50]);
    expect(wedge!.corners[1]).toEqual([expect.closeTo((6 + 50 / 3) / 60, 5), 100]);
  });

  it('reaches as far as the fastest way though every sensor was faster, never back in time', () => {
    const rate = { atLeast: 0.5, atMost: 3, over: [50, 100], average: 'chord', of: 'every' };
    const [wedge] = wedgesOf(rate, steady([{ startMin: 0, ratePerMin: 30 }]));
    const [, fast, far] = wedge!.corners;
    expect(far![0]).toBeGreaterThanOrEqual(fast![0]);
  });

  it('leaves out a sensor that is too slow', () => {
    const rate = { atLeast: 1, atMost: 3, over: [50, 100], average: 'chord', of: 'every' };
    const [wedge] = wedgesOf(rate, steady([{ startMin: 0, ratePerMin: 0.5 }]));
    // At 50 °C after 60 min; the slowest way takes 50 min, the sensor 100.
    expect(wedge!.corners).toEqual([
      [1, 50],
      [expect.closeTo((60 + 50 / 3) / 60, 5), 100],
      [expect.closeTo(110 / 60, 5), 100],
      [1, 50],
    ]);
  });

  it('counts rates an hour where the cycle does', () => {
    const rate = { atMost: 60, over: [50, 100], average: 'chord', of: 'every' };
    const [wedge] = wedgesOf(rate, steady([{ startMin: 0, ratePerMin: 1 }]), 'heat', '°C/h');
    expect(wedge!.corners[1]![0] - wedge!.corners[0]![0]).toBeCloseTo(50 / 60, 4);
  });

  it('is not drawn where no sensor began the range', () => {
    const rate = { atMost: 3, over: [50, 100], average: 'chord', of: 'every' };
    expect(wedgesOf(rate, steady([{ startMin: 0, ratePerMin: 0 }]))).toEqual([]);
  });

  it('leads downwards in cooling', () => {
    const rate = { atMost: 3, over: [170, 70], average: 'chord', of: 'every' };
    const [wedge] = wedgesOf(rate, steady([{ startMin: 0, ratePerMin: -1 }], 180), 'cool');
    expect(wedge!.corners.map(([, value]) => value)).toEqual([170, 70, 70, 170]);
  });
});

describe('runOverRange', () => {
  const [channel] = steady([{ startMin: 0, ratePerMin: 2 }]);

  it('runs from the crossing of the first temperature to that of the second', () => {
    const { startMs, endMs } = runOverRange(channel!, [50, 100], 0)!;
    expect(startMs / MINUTE_MS).toBeCloseTo(15, 6);
    expect(endMs / MINUTE_MS).toBeCloseTo(40, 6);
  });

  it('starts at the last crossing before the second is reached', () => {
    const timeMs = Float64Array.from([0, 1, 2, 3, 4, 5]);
    const layout = { column: 'T', name: 'T', role: 'part', unit: '°C' } as const;
    const dented = drawnChannel(
      layout,
      'temperature',
      timeMs,
      Float64Array.of(40, 60, 40, 60, Number.NaN, 100),
      AS_IT_STANDS,
      undefined,
    );
    expect(runOverRange(dented, [50, 100], 0)).toEqual({
      startMs: expect.closeTo(2.5, 6),
      endMs: expect.closeTo(5, 6),
    });
    expect(runOverRange(dented, [50, 200], 0)).toEqual({ startMs: expect.closeTo(2.5, 6), endMs: 5 });
    expect(runOverRange(dented, [110, 200], 0)).toBeNull();
    expect(runOverRange(dented, [50, 100], 3)).toBeNull();
  });

  it('reaches a temperature that a reading shows exactly, though scale and unit leave dust', () => {
    const timeMs = Float64Array.from([0, 60_000, 120_000, 180_000, 240_000]);
    const layout = { column: 'T', name: 'T', role: 'part', unit: '°C', scale: 0.1 } as const;
    const toFahrenheit = temperatureConversion('°C', '°F')!;
    for (let tenths = 101; tenths < 1700; tenths += 7) {
      const value = (9 * (tenths / 10)) / 5 + 32;
      const falling = drawnChannel(
        layout,
        'temperature',
        timeMs,
        Float64Array.of(1800, 1750, tenths, tenths, 50),
        toFahrenheit,
        undefined,
      );
      const run = runOverRange(falling, [350, value], 0)!;
      expect(run.endMs).toBeCloseTo(120_000, 2);
    }
  });

  it('reaches a temperature that a reading shows exactly', () => {
    const timeMs = Float64Array.from([0, 60_000, 120_000]);
    const layout = { column: 'T', name: 'T', role: 'part', unit: '°C' } as const;
    const exact = drawnChannel(layout, 'temperature', timeMs, Float64Array.of(40, 100, 100), AS_IT_STANDS, undefined);
    expect(runOverRange(exact, [50, 100], 0)!.endMs).toBeCloseTo(60_000, 3);
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Track } from '../../../models/run/track.ts';

function trackOf(times: readonly number[], values: readonly number[]): Track {
  const track = new Track('TC1');
  times.forEach((timeMs, i) => {
    track.push(timeMs, values[i]!, i);
  });
  return track;
}

const NORRIS: readonly (readonly [number, number])[] = [
  [0.1, 0.2],
  [338.8, 337.4],
  [118.1, 118.2],
  [888.0, 884.6],
  [9.2, 10.1],
  [228.1, 226.5],
  [668.5, 666.3],
  [998.5, 996.3],
  [449.1, 448.6],
  [778.9, 777.0],
  [559.2, 558.2],
  [0.3, 0.4],
  [0.1, 0.6],
  [778.1, 775.5],
  [668.8, 666.9],
  [339.3, 338.0],
  [448.9, 447.5],
  [10.8, 11.6],
  [557.7, 556.0],
  [228.3, 228.1],
  [998.0, 995.8],
  [888.8, 887.6],
  [119.6, 120.2],
  [0.3, 0.3],
  [0.6, 0.3],
  [557.6, 556.8],
  [339.3, 339.1],
  [888.0, 887.2],
  [998.5, 999.0],
  [778.9, 779.0],
  [10.2, 11.1],
  [117.6, 118.3],
  [228.9, 229.2],
  [668.4, 669.1],
  [449.2, 448.9],
  [0.2, 0.5],
];

describe('crossings', () => {
  it('fall where the line between two readings meets the level', () => {
    const track = trackOf([0, 100, 400, 500], [300, 400, 400, 300]);
    expect(track.crossings(390, '>=').intervals()).toEqual([{ from: 90, until: 410 }]);
  });

  it('count a reading exactly on the level as at or above it, and not as above it', () => {
    const track = trackOf([0, 60, 120, 180], [349, 350, 350, 349]);
    expect(track.crossings(350, '>=').intervals()).toEqual([{ from: 60, until: 120 }]);
    expect(track.crossings(350, '>').intervals()).toEqual([]);
  });

  it('are the same whether asked after each reading or once', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 90, max: 110 }), { minLength: 2, maxLength: 80 }), (values) => {
        const whole = trackOf(
          values.map((_, i) => 60 * i),
          values,
        );
        const piecemeal = new Track('TC1');
        values.forEach((value, i) => {
          piecemeal.push(60 * i, value, i);
          piecemeal.crossings(100, '>=');
        });
        expect(piecemeal.crossings(100, '>=').intervals()).toEqual(whole.crossings(100, '>=').intervals());
      }),
    );
  });

  it('do not move when readings are added on the lines between readings', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 80, max: 120 }), { minLength: 2, maxLength: 40 }), (values) => {
        const coarse = trackOf(
          values.map((_, i) => 60_000 * i),
          values,
        );
        const fineTimes: number[] = [];
        const fineValues: number[] = [];
        values.forEach((value, i) => {
          fineTimes.push(60_000 * i);
          fineValues.push(value);
          const next = values[i + 1];
          if (next === undefined) return;
          for (let k = 1; k < 4; k++) {
            fineTimes.push(60_000 * i + 15_000 * k);
            fineValues.push(value + ((next - value) * k) / 4);
          }
        });
        const fine = trackOf(fineTimes, fineValues);
        const [a, b] = [coarse.crossings(100.3, '>=').intervals(), fine.crossings(100.3, '>=').intervals()];
        expect(b.length).toBe(a.length);
        a.forEach((stretch, i) => {
          expect(b[i]!.from).toBeCloseTo(stretch.from, 3);
          expect(b[i]!.until).toBeCloseTo(stretch.until, 3);
        });
      }),
    );
  });
});

describe('slopes', () => {
  it('are the certified regression of the NIST data set Norris', () => {
    // NIST StRD, linear regression, data set Norris (y over x, 36 observations): certified slope 1.00211681802045.
    // x serves as minutes; equal x are set a millisecond apart, which moves the slope by less than 1e-7.
    const rows = NORRIS.map(([y, x]) => ({ x, y })).sort((a, b) => a.x - b.x);
    const times = rows.map(({ x }, i) => Math.round(x * 60_000) + i);
    const track = trackOf(
      times,
      rows.map(({ y }) => y),
    );
    const { perMin } = track.slopes(times.at(-1)! - times[0]!, Number.POSITIVE_INFINITY);
    expect(perMin.length).toBe(1);
    expect(Math.abs(perMin.value[0]! - 1.00211681802045)).toBeLessThan(1e-6);
  });

  it('of a straight ramp are its rate to 1e-9, late in a long run as early', () => {
    const times = Array.from({ length: 36_000 }, (_, i) => 1000 * i);
    const track = trackOf(
      times,
      times.map((t) => 20 + (1.75 * t) / 60_000),
    );
    const { perMin } = track.slopes(600_000, 60_000);
    for (let i = 0; i < perMin.length; i += 501) expect(Math.abs(perMin.value[i]! / 1.75 - 1)).toBeLessThan(1e-9);
  });

  it('leave out a window that touches a gap', () => {
    const times = [0, 1, 2, 3, 4, 15, 16, 17, 18, 19, 20].map((min) => min * 60_000);
    const track = trackOf(
      times,
      times.map((t) => t / 60_000),
    );
    const { perMin } = track.slopes(3 * 60_000, 5 * 60_000);
    expect(Array.from(perMin.value.subarray(0, perMin.length), Number.isNaN)).toEqual([
      false,
      false,
      true,
      true,
      true,
      false,
      false,
      false,
    ]);
  });

  it('of a window with fewer than three readings are its chord', () => {
    const track = trackOf(
      [0, 6, 12, 18].map((min) => min * 60_000),
      [20, 26, 38, 50],
    );
    const { perMin } = track.slopes(10 * 60_000, 30 * 60_000);
    expect(perMin.value[0]).toBeCloseTo((26 + (12 * 4) / 6 - 20) / 10, 12);
  });
});

import { describe, expect, it } from 'vitest';
import { pressureAgainst, voidGrowthAlong } from '../../../models/cure/void-growth-along.ts';
import { readReference } from '../../reference/cure/reference-sets.ts';

// Source: test/reference/cure/void-growth.json (4962 exp(−4892/T) RH atm beside the IAPWS saturation line).
const { rows } = readReference<{ rows: { T_C: number; Pmin_RH50_kPa: number }[] }>('void-growth.json');
const kPaAt = (temperatureC: number) => rows.find(({ T_C }) => T_C === temperatureC)!.Pmin_RH50_kPa;
const kelvin = (...celsius: number[]) => Float64Array.from(celsius, (c) => c + 273.15);
const minutes = (...at: number[]) => Float64Array.from(at, (minute) => 60_000 * minute);

describe('voidGrowthAlong', () => {
  it('is set by the hottest point in every scan', () => {
    const points = [
      { temperatureK: kelvin(100, 120, 180), gelMs: null },
      { temperatureK: kelvin(80, 150, Number.NaN), gelMs: null },
    ];
    const leastPa = voidGrowthAlong(minutes(0, 1, 2), points, 50);
    [100, 150, 180].forEach((hottestC, i) => {
      expect(leastPa[i]! / (1000 * kPaAt(hottestC))).toBeCloseTo(1, 12);
    });
  });

  it('asks nothing for a point that has gelled, and nothing at all once all have', () => {
    const points = [
      { temperatureK: kelvin(180, 180, 180, 180), gelMs: 60_000 },
      { temperatureK: kelvin(150, 150, 150, 150), gelMs: 120_000 },
    ];
    const leastPa = voidGrowthAlong(minutes(0, 1, 2, 3), points, 50);
    const told = [180, 180, 150].map((temperatureC) => 1000 * kPaAt(temperatureC));
    told.forEach((pa, i) => {
      expect(leastPa[i]! / pa).toBeCloseTo(1, 12);
    });
    expect(leastPa[3]).toBeNaN();
  });

  it('says nothing outside 0 to 200 °C rather than going on with the line', () => {
    const leastPa = voidGrowthAlong(minutes(0, 1, 2), [{ temperatureK: kelvin(-5, 200.1, 100), gelMs: null }], 50);
    expect([leastPa[0], leastPa[1]]).toEqual([Number.NaN, Number.NaN]);
    expect(leastPa[2]).toBeGreaterThan(0);
  });
});

describe('pressureAgainst', () => {
  const least = Float64Array.of(1e5, 1e5, 1e5, 1e5, Number.NaN);

  it('finds where a pressure lay below, between scans by a straight line', () => {
    const read = Float64Array.of(2e5, 0.5e5, 0.5e5, 1.5e5, 0);
    expect(pressureAgainst(minutes(0, 3, 6, 9, 12), read, least)).toEqual({
      fromMs: 0,
      untilMs: 540_000,
      // From 2 to 0.5 bar in 3 min: 1 bar is passed after 2; from 0.5 to 1.5 bar in 3: after 1.5.
      below: [{ fromMs: 120_000, untilMs: 450_000 }],
    });
  });

  it('counts from the first scan and to the last that know both', () => {
    const read = Float64Array.of(Number.NaN, 0.5e5, Number.NaN, 0.5e5, 9e5);
    expect(pressureAgainst(minutes(0, 3, 6, 9, 12), read, least)).toEqual({
      fromMs: 180_000,
      untilMs: 540_000,
      below: [{ fromMs: 180_000, untilMs: 540_000 }],
    });
  });

  it('is above where it only touches, and unknown where nothing is known', () => {
    expect(pressureAgainst(minutes(0, 1, 2, 3, 4), least, least)!.below).toEqual([]);
    expect(pressureAgainst(minutes(0, 1), Float64Array.of(Number.NaN, 1), Float64Array.of(1, Number.NaN))).toBeNull();
  });
});

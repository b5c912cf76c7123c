import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { beginCure } from '../../../models/cure/cure-progress.ts';
import { glassTransitionK } from '../../../models/cure/glass-transition.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { DomainError } from '../../../models/errors.ts';
import { historyOf, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

const [noisyS, noisyK] = historyOf('hubert_8552', 'noisy_two_dwell_1Hz');
const hubert = recalledResin('hubert_8552');
const lls = recalledResin('lls_3501_6');

function codeOf(action: () => unknown): string {
  try {
    action();
  } catch (error) {
    if (error instanceof DomainError) return error.code;
    throw error;
  }
  return 'not refused';
}

describe('beginCure', () => {
  it('gives the same bytes asked after every scan, asked never, and in one go', () => {
    const whole = cureAlong(noisyS, noisyK, lls);
    const [asked, silent] = [beginCure(lls), beginCure(lls)];
    const alpha = Float64Array.from(noisyS, (timeS, i) => {
      asked.accept(timeS, noisyK[i]!);
      silent.accept(timeS, noisyK[i]!);
      asked.tgK();
      asked.alphaAt(timeS + 30, noisyK[i]! + 5);
      return asked.alpha();
    });
    expect(alpha).toEqual(whole.alpha);
    for (const progress of [asked, silent]) {
      expect([progress.alpha(), progress.tgK()]).toEqual([whole.finalAlpha, whole.finalTgK]);
      expect([progress.gelS, progress.vitrifiesS]).toEqual([whole.gelS, whole.vitrifiesS]);
    }
  });

  it('goes on alike in a copy, and leaves the original alone', () => {
    const original = beginCure(hubert);
    for (let i = 0; i < 8000; i += 1) original.accept(noisyS[i]!, noisyK[i]!);
    const before = original.alpha();
    const copied = original.copy();
    for (let i = 8000; i < noisyS.length; i += 1) copied.accept(noisyS[i]!, noisyK[i]!);
    expect(original.alpha()).toBe(before);
    expect(original.gelS).toBeNull();
    const whole = cureAlong(noisyS, noisyK, hubert);
    expect([copied.alpha(), copied.gelS, copied.vitrifiesS]).toEqual([whole.finalAlpha, whole.gelS, whole.vitrifiesS]);
  });

  it('does not shift with the clock', () => {
    const later = cureAlong(
      noisyS.map((s) => s + 1772438040),
      noisyK,
      hubert,
    );
    const whole = cureAlong(noisyS, noisyK, hubert);
    expect(Math.abs(later.finalAlpha - whole.finalAlpha)).toBeLessThan(1e-12);
    expect(Math.abs(later.gelS! - 1772438040 - whole.gelS!)).toBeLessThan(1e-5);
  });

  it('starts gelled where the start degree says so', () => {
    const progress = beginCure(hubert, { startDegree: 0.6 });
    progress.accept(100, 300);
    expect([progress.gelS, progress.alpha()]).toEqual([100, 0.6]);
  });

  it('counts the time outside the valid range, by the straight lines between scans', () => {
    const resin: Resin = { ...hubert, validC: [60, 160] };
    const timeS = Float64Array.of(0, 1600, 2600, 4200);
    const temperatureK = Float64Array.of(20, 180, 180, 20).map((c) => c + 273.15);
    // Up to 60 °C 400 s, from 160 °C on 200 s, 1000 s at 180 °C, and the same again on the way down.
    expect(cureAlong(timeS, temperatureK, resin).outsideValidS).toBeCloseTo(2 * (400 + 200) + 1000, 6);
    const onTheLine = Float64Array.of(160, 160).map((c) => c + 273.15);
    expect(cureAlong(Float64Array.of(0, 50), onTheLine, resin).outsideValidS).toBe(0);
  });

  it('refuses starts, tolerances, times and temperatures that are none', () => {
    for (const startDegree of [1, -0.1, Number.NaN, 0]) {
      expect(codeOf(() => beginCure(hubert, { startDegree }))).toBe('option-out-of-range');
    }
    expect(codeOf(() => beginCure(hubert, { tolerance: 0 }))).toBe('option-out-of-range');
    expect(codeOf(() => cureAlong(new Float64Array(0), new Float64Array(0), hubert))).toBe('option-out-of-range');
    const along = (timeS: number[], temperatureK: number[]) => () =>
      cureAlong(Float64Array.from(timeS), Float64Array.from(temperatureK), hubert);
    expect(codeOf(along([0, 0], [300, 300]))).toBe('time-not-increasing');
    expect(codeOf(along([Number.NaN], [300]))).toBe('time-not-increasing');
    expect(codeOf(along([0, 1], [300, Number.NaN]))).toBe('cure-out-of-bounds');
    // A history in °C, taken for K.
    expect(codeOf(along([0, 60], [20, 21]))).toBe('cure-out-of-bounds');
  });

  it('refuses a cure that stalls or runs backwards, with its figures', () => {
    // Half-cured 3501-6 in a freezer: its first branch stands still at 0.266 at −18 °C.
    const cold = () => cureAlong(Float64Array.of(0, 60), Float64Array.of(255.15, 255.15), lls, { startDegree: 0.29 });
    expect(codeOf(cold)).toBe('cure-stalls');
    expect(cold).toThrow(/-18\.00 °C, where it never passes degree 0\.26/);
    // 100 years at 5 °C: it creeps up to 1.0432 exp(−348.8/278.15) = 0.2977 < 0.3 and stays.
    const century = () => cureAlong(Float64Array.of(0, 3.2e9), Float64Array.of(278.15, 278.15), lls);
    expect(codeOf(century)).toBe('cure-stalls');
  });
});

describe('vitrification', () => {
  const tgReaches = (timeS: Float64Array, temperatureK: Float64Array, resin: Resin) =>
    cureAlong(timeS, temperatureK, resin).vitrifiesS;

  it('is not a cool-down through the Tg', () => {
    // 150 °C for 40 min, then −2 °C/min: Tg 110 °C is passed on the way down only.
    const timeS = Float64Array.of(0, 2400, 6000);
    const temperatureK = Float64Array.of(423.15, 423.15, 303.15);
    expect(tgReaches(timeS, temperatureK, hubert)).toBeNull();
  });

  it('comes ten minutes into a hold below the Tg, when the fall is out of sight', () => {
    // −2 °C/min to 60 °C, Tg above it, then a hold: T(t − 10 min) − T(t) falls to 1 °C when 0.5 min of fall are left.
    const timeS = Float64Array.of(0, 2400, 5100, 9000);
    const temperatureK = Float64Array.of(423.15, 423.15, 333.15, 333.15);
    expect(tgReaches(timeS, temperatureK, hubert)).toBeCloseTo(5100 + 600 - 30, 3);
  });

  it('is seen at the same moment however finely the history is scanned', () => {
    const timeS = Float64Array.of(0, 2400, 5100, 9000);
    const fine = Float64Array.from({ length: 9001 }, (_, i) => i);
    const fineK = fine.map((s) => (s <= 2400 ? 423.15 : s >= 5100 ? 333.15 : 423.15 - (90 * (s - 2400)) / 2700));
    const coarse = tgReaches(timeS, Float64Array.of(423.15, 423.15, 333.15, 333.15), hubert)!;
    expect(Math.abs(tgReaches(fine, fineK, hubert)! - coarse)).toBeLessThan(1e-3);
  });

  it('holds from the first scan where the roll had vitrified in store', () => {
    const progress = beginCure(hubert, { startDegree: 0.4 });
    progress.accept(50, glassTransitionK(0.4, hubert.glassTransition!) - 1);
    expect(progress.vitrifiesS).toBe(50);
  });
});

describe('any cure', () => {
  const anySet = fc.constantFrom(...Object.keys(referenceSets));
  // Temperatures of a cure; the range where no reference set stalls.
  const anyHistory = fc.array(
    fc.tuple(fc.double({ min: 1, max: 1800, noNaN: true }), fc.double({ min: 290, max: 470, noNaN: true })),
    { minLength: 2, maxLength: 12 },
  );
  const split = (history: [number, number][]): [Float64Array, Float64Array] => {
    let sum = 0;
    const timeS = Float64Array.from(history, ([s]) => {
      sum += s;
      return sum;
    });
    return [timeS, Float64Array.from(history, ([, k]) => k)];
  };

  it('never falls, stays within [0, 1] and ends at or above its start', () => {
    fc.assert(
      fc.property(anySet, anyHistory, (set, history) => {
        const { alpha } = cureAlong(...split(history), recalledResin(set));
        for (let i = 1; i < alpha.length; i += 1) expect(alpha[i]!).toBeGreaterThanOrEqual(alpha[i - 1]!);
        expect(alpha[0]!).toBeGreaterThanOrEqual(0);
        expect(alpha.at(-1)!).toBeLessThanOrEqual(1);
      }),
      { seed: 20260302 },
    );
  });

  it('does not change with the scan rate, nor with a later scan', () => {
    fc.assert(
      fc.property(anySet, anyHistory, fc.integer({ min: 2, max: 40 }), (set, history, parts) => {
        const [timeS, temperatureK] = split(history);
        const resin = recalledResin(set);
        const coarse = cureAlong(timeS, temperatureK, resin);
        const fine = beginCure(resin);
        fine.accept(timeS[0]!, temperatureK[0]!);
        for (let i = 1; i < timeS.length; i += 1) {
          for (let k = 1; k <= parts; k += 1) {
            const share = k / parts;
            const between = (values: Float64Array) => values[i - 1]! + share * (values[i]! - values[i - 1]!);
            fine.accept(
              k === parts ? timeS[i]! : between(timeS),
              k === parts ? temperatureK[i]! : between(temperatureK),
            );
          }
          expect(Math.abs(fine.alpha() - coarse.alpha[i]!)).toBeLessThan(1e-6);
        }
        if (coarse.gelS === null || fine.gelS === null) return;
        expect(Math.abs(coarse.gelS - fine.gelS)).toBeLessThan(0.05);
      }),
      { seed: 20260302 },
    );
  });

  it('is further along where it was hotter', () => {
    fc.assert(
      fc.property(anySet, anyHistory, fc.double({ min: 0.1, max: 5, noNaN: true }), (set, history, hotterK) => {
        const [timeS, temperatureK] = split(history);
        const resin = recalledResin(set);
        const hotter = temperatureK.map((k) => k + hotterK);
        const cool = cureAlong(timeS, temperatureK, resin).finalAlpha;
        expect(cureAlong(timeS, hotter, resin).finalAlpha).toBeGreaterThanOrEqual(cool - 1e-7);
      }),
      { seed: 20260302 },
    );
  });
});
